import type { Interval } from './interval';

export type DomainCause =
  | 'division-by-zero'
  | 'root-of-negative'
  | 'logarithm-of-nonpositive'
  | 'power-of-negative'
  | 'pole-of-tangent';

/**
 * An operation met points outside its domain and has no enclosing interval. The operand may be
 * wider than the values it stands for, so an issue that does not hold everywhere shows only that
 * the point could not be excluded.
 */
export interface DomainIssue {
  readonly cause: DomainCause;
  /** Every point of the operands lies outside the domain. */
  readonly everywhere: boolean;
}

export function isDomainIssue(result: Interval | DomainIssue): result is DomainIssue {
  return 'cause' in result;
}
