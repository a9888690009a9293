/** Interval arithmetic with outward rounding: every result encloses all exact values. */
export { abs } from './abs';
export { add } from './add';
export { cos } from './cos';
export {
  addDown,
  addUp,
  divideDown,
  divideUp,
  multiplyDown,
  multiplyUp,
  sqrtDown,
  sqrtUp,
} from './directed-operations';
export { divide } from './divide';
export { isDomainIssue } from './domain-issue';
export type { DomainCause, DomainIssue } from './domain-issue';
export { exp } from './exp';
export { containsZero, interval, pointInterval } from './interval';
export type { Interval } from './interval';
export { log } from './log';
export { multiply } from './multiply';
export { negate } from './negate';
export { pow } from './pow';
export { powerInteger } from './power-integer';
export { nextDown, nextUp } from './rounding';
export { sin } from './sin';
export { sqrt } from './sqrt';
export { subtract } from './subtract';
export { tan } from './tan';
