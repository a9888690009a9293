import { sqrtDown, sqrtUp } from './directed-operations';
import type { DomainIssue } from './domain-issue';
import type { Interval } from './interval';

/** Encloses √x; an issue if the operand has a negative part. */
export function sqrt(x: Interval): Interval | DomainIssue {
  if (x.low < 0) return { cause: 'root-of-negative', everywhere: x.high < 0 };
  return { low: sqrtDown(x.low), high: sqrtUp(x.high) };
}
