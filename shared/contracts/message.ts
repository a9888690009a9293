import { quoted } from './quoted';

/** What zod hands to a message function: the value that was refused. */
export interface Refused {
  readonly input?: unknown;
  readonly code?: string | undefined;
}

/**
 * A message for a key that holds the wrong thing or is left out. `what` names what belongs there, `remedy` adds how to
 * fill a missing key when that is not obvious.
 */
export function needs(what: string, remedy = ''): (issue: Refused) => string {
  return ({ input }) => {
    if (input === undefined) return `is missing; give ${what}${remedy === '' ? '' : ` ${remedy}`}`;
    if (typeof input === 'number' && !Number.isFinite(input)) return 'must be finite';
    if (input === null) return `must be ${what}, not null`;
    return `must be ${what}`;
  };
}

/** The message for a word that is not one of the known ones; lists these. */
export function oneOf(known: readonly string[]): (issue: Refused) => string {
  const list = known.join(', ');
  return ({ input }) => {
    if (input === undefined) return `is missing; give one of ${list}`;
    return typeof input === 'string'
      ? `${quoted(input)} is not known; must be one of ${list}`
      : `must be one of ${list}`;
  };
}
