import { canonicalJson, type Study } from '../../../../../shared/contracts';

/**
 * A study that may be half filled in, as a draft may be: what forms need to show it is there, and the engine says
 * what is wrong with the rest. Undefined for what no form could show.
 */
export function draftStudy(value: unknown): Study | undefined {
  return isShown(value) ? value : undefined;
}

/** Whether two studies are one and the same, in whatever order their keys stand. */
export function isSameStudy(a: unknown, b: unknown): boolean {
  return a === b || canonicalJson(a) === canonicalJson(b);
}

function isShown(value: unknown): value is Study {
  return (
    isObject(value) &&
    isObject(value['machine']) &&
    areObjectsWith('id', value['parameters']) &&
    areObjectsWith('measure', value['requirements'])
  );
}

function isObject(value: unknown): value is Record<string, unknown> {
  return typeof value === 'object' && value !== null && !Array.isArray(value);
}

function areObjectsWith(key: string, value: unknown): boolean {
  return Array.isArray(value) && value.every((entry) => isObject(entry) && typeof entry[key] === 'string');
}
