import { quoted } from './quoted';

/** Names that expressions give a meaning of their own. */
export const RESERVED_NAMES: ReadonlySet<string> = new Set([
  'sqrt',
  'sin',
  'cos',
  'tan',
  'exp',
  'log',
  'abs',
  'pi',
  'g0',
]);

const IDENTIFIER = /^[A-Za-z][A-Za-z0-9_]*$/;

/** Why a text cannot be a name; undefined if it can. */
export function nameFault(name: string): string | undefined {
  if (IDENTIFIER.test(name)) return undefined;
  return `${quoted(name)} is not a name: a letter, then letters, digits and _`;
}

/** Why a text cannot be the id of a parameter or definition; undefined if it can. */
export function identifierFault(id: string): string | undefined {
  if (RESERVED_NAMES.has(id))
    return `${quoted(id)} has a meaning of its own in expressions; choose another name`;
  return nameFault(id);
}
