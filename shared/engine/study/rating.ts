import { ratingFault, type PathPart, type Scalar, type Study } from '../../contracts';
import { toSi, type Unit } from '../../units';
import type { ComposedRating } from './composed-study';
import type { ExactValues } from './exact-values';
import type { FaultList } from './fault-list';
import { composeRequirements } from './requirements';

/** The rating; its payload and step are in the payload's unit. */
export function composeRating(
  study: Study,
  unit: Unit | undefined,
  inputs: readonly string[],
  exact: ExactValues,
  faults: FaultList,
): ComposedRating | undefined {
  const { rating } = study;
  if (rating === undefined) return undefined;
  const number = (
    quantity: 'payload' | 'step' | 'factor',
    scalar: Scalar,
    path: readonly PathPart[],
  ): number | undefined => {
    const value = exact.number(scalar, path);
    const fault = value === undefined ? undefined : ratingFault(quantity, value);
    if (fault !== undefined) faults.add(path, fault);
    return value;
  };
  const load = (quantity: 'payload' | 'step'): number | undefined => {
    const scalar = rating[quantity];
    const value = scalar === undefined ? undefined : number(quantity, scalar, ['rating', quantity]);
    return value === undefined || unit === undefined ? value : toSi(value, unit);
  };
  return {
    payload: load('payload'),
    step: load('step'),
    tests: (rating.tests ?? []).map(({ name, factor, requirements }, index) => {
      const path = ['rating', 'tests', index];
      return {
        name,
        factor: number('factor', factor, [...path, 'factor']) ?? 1,
        requirements:
          requirements === undefined
            ? undefined
            : composeRequirements(requirements, [...path, 'requirements'], inputs, exact, faults),
      };
    }),
  };
}
