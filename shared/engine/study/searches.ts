import { searchFault, type Study, type Warning } from '../../contracts';
import { fromSi, toSi } from '../../units';
import type { ComposedParameter } from './composed-study';
import type { ExactValues } from './exact-values';
import type { FaultList } from './fault-list';

export interface ComposedSearches {
  readonly searchUpTo: number | undefined;
  readonly searchDownTo: number | undefined;
}

/** The ends of the payload searches that the study gives, from the payload's unit, within its minimum and maximum. */
export function composeSearches(
  study: Study,
  payload: ComposedParameter | undefined,
  exact: ExactValues,
  faults: FaultList,
  warnings: Warning[],
): ComposedSearches {
  const end = (which: 'searchUpTo' | 'searchDownTo'): number | undefined => {
    const given = study[which];
    const value = given === undefined ? undefined : exact.number(given, [which]);
    if (value === undefined || payload === undefined) return undefined;
    const unit = payload.unit;
    const own = (si: number): number => (unit === undefined ? si : fromSi(si, unit));
    const fault = searchFault(which, value, { nominal: own(payload.nominal), high: own(payload.high) });
    const si = unit === undefined ? value : toSi(value, unit);
    if (fault !== undefined) faults.add([which], fault);
    else if (!Number.isFinite(si)) faults.add([which], 'is too large for a number in SI');
    if (si > payload.maximum) {
      warnings.push({ path: which, message: `lies above the payload's maximum; the search ends there` });
    }
    if (si < payload.minimum) {
      warnings.push({ path: which, message: `lies below the payload's minimum; the search ends there` });
    }
    return Math.max(payload.minimum, Math.min(payload.maximum, si));
  };
  return { searchUpTo: end('searchUpTo'), searchDownTo: end('searchDownTo') };
}
