import { fromSi, fromSiDown, fromSiUp, toSi } from '../../units';
import type { ComposedParameter } from '../study';
import type { SearchSpace } from './search-variables';

/** Results leave the engine in the units of their parameters; a proved value is rounded to the safe side. */
export function inUnit({ unit }: ComposedParameter, value: number): number {
  return unit === undefined ? value : fromSi(value, unit);
}

/** The largest value in the parameter's unit that is not above an SI value. */
export function inUnitDown({ unit }: ComposedParameter, value: number): number {
  return unit === undefined ? value : fromSiDown(value, unit);
}

/** The smallest value in the parameter's unit that is not below an SI value. */
export function inUnitUp({ unit }: ComposedParameter, value: number): number {
  return unit === undefined ? value : fromSiUp(value, unit);
}

/**
 * Moves a point to the nearest one that can be written in the parameters' units, so that what is reported is
 * exactly what was certified. Values at an end of a band are written already.
 */
export function snapToUnits(
  parameters: readonly ComposedParameter[],
  space: SearchSpace,
  point: Float64Array,
): void {
  space.parameters.forEach((parameter, i) => {
    const { unit } = parameters[parameter];
    const { low, nominal, high } = space.variables[i];
    const value = point[i];
    if (unit !== undefined && value !== low && value !== nominal && value !== high) {
      point[i] = toSi(fromSi(value, unit), unit);
    }
  });
}

/** A point as a record of parameter values in their units. */
export function witnessRecord(
  parameters: readonly ComposedParameter[],
  space: SearchSpace,
  point: ArrayLike<number>,
): Record<string, number> {
  return Object.fromEntries(
    space.parameters.map((parameter, i) => [
      parameters[parameter].id,
      inUnit(parameters[parameter], point[i]),
    ]),
  );
}
