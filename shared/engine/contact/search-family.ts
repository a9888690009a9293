import { nextDown, nextUp } from '../../expressions';
import type { Range } from '../polynomial/bernstein-form';

/** One toleranced parameter, or the payload, in SI units. */
export interface SearchVariable {
  readonly nominal: number;
  readonly low: number;
  readonly high: number;
  /** Physical ends; ±Infinity where there are none. */
  readonly minimum: number;
  readonly maximum: number;
  /** Whether the band stretches; a `use` parameter other than the payload keeps its band. */
  readonly stretches: boolean;
}

/**
 * A growing family of boxes around the nominal point. A search looks for the smallest objective at which the box
 * holds a failing point. Coordinates c ∈ [−1, 1] place a point within the box of an objective, −1 and 1 at its ends.
 */
export interface SearchFamily {
  readonly variables: number;
  /** Largest objective searched. */
  readonly reach: number;
  /** The largest difference allowed between what is proved and what fails, at an objective. */
  gapAt(objective: number): number;
  /** The box that holds every point of at most this objective. */
  rangesAt(objective: number): Range[];
  placePoint(objective: number, coordinates: ArrayLike<number>, point: Float64Array): void;
  objectiveOf(point: ArrayLike<number>): number;
  coordinatesOf(point: ArrayLike<number>, coordinates: Float64Array): void;
  /** A lower bound of the objective over the box of these ranges. */
  objectiveBound(low: ArrayLike<number>, high: ArrayLike<number>): number;
  /** Variables whose coordinate may be chosen. */
  readonly free: readonly number[];
}

/** Relative gap between both sides of an answer (study format: 0.2 %), halved for the clip at the witness. */
export const RELATIVE_GAP = 0.001;

function bandPoint({ nominal, low, high }: SearchVariable, coordinate: number): number {
  if (coordinate >= 1) return high;
  if (coordinate <= -1) return low;
  return coordinate >= 0 ? nominal + coordinate * (high - nominal) : nominal + coordinate * (nominal - low);
}

function bandCoordinate({ nominal, low, high }: SearchVariable, value: number): number {
  const half = value >= nominal ? high - nominal : nominal - low;
  return half > 0 ? Math.max(-1, Math.min(1, (value - nominal) / half)) : 0;
}

/** The payload moves from its nominal towards an end; every other variable is anywhere in its band. */
export function payloadFamily(
  variables: readonly SearchVariable[],
  payload: number,
  end: number,
): SearchFamily {
  const { nominal } = variables[payload];
  const sign = end < nominal ? -1 : 1;
  const reach = Math.abs(end - nominal);
  const valueAt = (objective: number): number => (objective >= reach ? end : nominal + sign * objective);
  return {
    variables: variables.length,
    reach,
    gapAt: (objective) =>
      RELATIVE_GAP * Math.max(Math.abs(valueAt(objective)), Math.abs(nominal), 1e-9 * reach),
    rangesAt: (objective) =>
      variables.map(({ low, high }, i) => {
        if (i !== payload) return { low, high };
        const value = valueAt(objective);
        return { low: Math.min(value, nominal), high: Math.max(value, nominal) };
      }),
    placePoint: (objective, coordinates, point) =>
      variables.forEach((variable, i) => {
        point[i] = i === payload ? valueAt(objective) : bandPoint(variable, coordinates[i]);
      }),
    objectiveOf: (point) => Math.abs(point[payload] - nominal),
    coordinatesOf: (point, coordinates) =>
      variables.forEach((variable, i) => (coordinates[i] = bandCoordinate(variable, point[i]))),
    objectiveBound: (low, high) => (sign > 0 ? low[payload] - nominal : nominal - high[payload]),
    free: variables.map((_, i) => i).filter((i) => i !== payload && variables[i].high > variables[i].low),
  };
}

/** All bands grow about their nominals in proportion, within the physical ends. */
export function stretchFamily(variables: readonly SearchVariable[], reach: number): SearchFamily {
  const stretched = (i: number): boolean => variables[i].stretches && variables[i].high > variables[i].low;
  const half = (variable: SearchVariable, upper: boolean): number =>
    upper ? variable.high - variable.nominal : variable.nominal - variable.low;
  const endAt = (variable: SearchVariable, objective: number, upper: boolean): number => {
    const width = objective * half(variable, upper);
    const { nominal, minimum, maximum, low, high } = variable;
    if (width === 0) return nominal;
    // At factor 1 the ends are the band's own; elsewhere the box is widened by the rounding of its ends.
    if (objective === 1) return upper ? high : low;
    return upper ? Math.min(maximum, nextUp(nominal + width)) : Math.max(minimum, nextDown(nominal - width));
  };
  return {
    variables: variables.length,
    reach,
    gapAt: (objective) => RELATIVE_GAP * objective,
    rangesAt: (objective) =>
      variables.map((variable, i) =>
        stretched(i)
          ? { low: endAt(variable, objective, false), high: endAt(variable, objective, true) }
          : { low: variable.low, high: variable.high },
      ),
    placePoint: (objective, coordinates, point) =>
      variables.forEach((variable, i) => {
        const c = coordinates[i];
        if (!stretched(i)) point[i] = bandPoint(variable, c);
        else {
          const offset = objective * c * half(variable, c >= 0);
          point[i] = Math.max(variable.minimum, Math.min(variable.maximum, variable.nominal + offset));
        }
      }),
    objectiveOf: (point) => {
      let objective = 0;
      variables.forEach((variable, i) => {
        const offset = point[i] - variable.nominal;
        const width = half(variable, offset >= 0);
        if (stretched(i) && width > 0) objective = Math.max(objective, Math.abs(offset) / width);
      });
      return objective;
    },
    coordinatesOf(point, coordinates) {
      const objective = this.objectiveOf(point);
      variables.forEach((variable, i) => {
        if (!stretched(i)) coordinates[i] = bandCoordinate(variable, point[i]);
        else {
          const offset = point[i] - variable.nominal;
          const width = objective * half(variable, offset >= 0);
          coordinates[i] = width > 0 ? Math.max(-1, Math.min(1, offset / width)) : 0;
        }
      });
    },
    objectiveBound: (low, high) => {
      let objective = 0;
      variables.forEach((variable, i) => {
        if (!stretched(i)) return;
        const { nominal } = variable;
        const offset = low[i] > nominal ? low[i] - nominal : high[i] < nominal ? nominal - high[i] : 0;
        const width = half(variable, low[i] > nominal);
        if (offset > 0 && width > 0) objective = Math.max(objective, offset / width);
      });
      return objective;
    },
    free: variables.map((_, i) => i).filter((i) => variables[i].high > variables[i].low),
  };
}

/** The bands as they stand: one box, any contact counts. */
export function bandsFamily(variables: readonly SearchVariable[]): SearchFamily {
  return {
    variables: variables.length,
    reach: 0,
    gapAt: () => 0,
    rangesAt: () => variables.map(({ low, high }) => ({ low, high })),
    placePoint: (_, coordinates, point) =>
      variables.forEach((variable, i) => (point[i] = bandPoint(variable, coordinates[i]))),
    objectiveOf: () => 0,
    coordinatesOf: (point, coordinates) =>
      variables.forEach((variable, i) => (coordinates[i] = bandCoordinate(variable, point[i]))),
    objectiveBound: () => 0,
    free: variables.map((_, i) => i).filter((i) => variables[i].high > variables[i].low),
  };
}

/** One value of the payload, every other variable anywhere in its band. */
export function sliceFamily(variables: readonly SearchVariable[], payload: number): SearchFamily {
  return bandsFamily(
    variables.map((variable, i) =>
      i === payload ? { ...variable, low: variable.nominal, high: variable.nominal } : variable,
    ),
  );
}
