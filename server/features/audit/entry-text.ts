import type { EntryRow } from './audit.repository';

const UUID = /^[\da-f]{8}(-[\da-f]{4}){3}-[\da-f]{12}$/;

type Names = ReadonlyMap<string, string>;

/** Every id in a value, however deep. */
function idsIn(value: unknown): string[] {
  if (typeof value === 'string') return UUID.test(value) ? [value] : [];
  return typeof value === 'object' && value !== null ? Object.values(value).flatMap(idsIn) : [];
}

/** The ids of everything that an entry speaks of. */
export function idsOf({ objectId, data }: EntryRow): string[] {
  return [...idsIn(objectId), ...idsIn(data)];
}

/** Who has no name is called by the beginning of its id, as elsewhere. */
function nameOf(id: string, names: Names): string {
  return names.get(id) ?? (UUID.test(id) ? id.slice(0, 8) : id);
}

/** `mayCreateProducts` → `may create products` */
function words(key: string): string {
  return key.replace(/([a-z\d])([A-Z])/g, '$1 $2').toLowerCase();
}

function valueText(value: unknown, names: Names): string {
  switch (typeof value) {
    case 'string':
      return nameOf(value, names);
    case 'boolean':
      return value ? 'yes' : 'no';
    case 'number':
      return String(value);
    case 'object':
      if (value === null) return 'nothing';
      if (Array.isArray(value)) return value.map((item) => valueText(item, names)).join(', ');
      if ('from' in value && 'to' in value) {
        return `${valueText(value.from, names)} → ${valueText(value.to, names)}`;
      }
      return detailsText(value, names);
    default:
      return '';
  }
}

function detailsText(data: object, names: Names): string {
  return Object.entries(data)
    .map(([key, value]) => `${words(key)}: ${valueText(value, names)}`)
    .join(', ');
}

/**
 * What an entry is about and what it says of it, in words. A name that was written down with the entry counts
 * before the present one: it was the name then.
 */
export function entryText({ objectKind, objectId, data }: EntryRow, names: Names) {
  const { name, ...rest } = data;
  const called = typeof name === 'string' ? name : nameOf(objectId, names);
  return { subject: `${words(objectKind)} ${called}`, details: detailsText(rest, names) };
}
