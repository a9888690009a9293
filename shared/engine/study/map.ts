import { MAP_DEFAULTS, type Study } from '../../contracts';
import { toSi } from '../../units';
import type { ComposedMap, ComposedParameter } from './composed-study';
import type { ExactValues } from './exact-values';
import type { FaultList } from './fault-list';

/** The share of a band, and of an exact nominal, by which a range that is left out goes beyond. */
const WIDENING = 0.5;

/** The map with its ranges in SI; undefined where the study has none or an axis has a fault. */
export function composeMap(
  study: Study,
  parameters: readonly (ComposedParameter | undefined)[],
  exact: ExactValues,
  faults: FaultList,
): ComposedMap | undefined {
  const { map } = study;
  if (map === undefined) return undefined;
  const axis = (key: 'x' | 'y'): { index: number; from: number; to: number } | undefined => {
    const end = (which: 'From' | 'To'): number | undefined => {
      const scalar = map[`${key}${which}`];
      return scalar === undefined ? undefined : exact.number(scalar, ['map', `${key}${which}`]);
    };
    const given = { from: end('From'), to: end('To') };
    const index = study.parameters.findIndex(({ id }) => id === map[key]);
    const parameter = parameters[index];
    if (parameter === undefined) return undefined;
    const si = (value: number): number =>
      parameter.unit === undefined ? value : toSi(value, parameter.unit);
    const range = defaultRange(parameter);
    const from = given.from === undefined ? range.from : si(given.from);
    const to = given.to === undefined ? range.to : si(given.to);
    const explicit =
      map[`${key}From`] !== undefined ? `${key}From` : map[`${key}To`] !== undefined ? `${key}To` : key;
    if (!Number.isFinite(from) || !Number.isFinite(to)) faults.add(['map', explicit], 'must be finite');
    else if (!(from < to)) {
      faults.add(
        ['map', explicit],
        `the range of ${key} is empty; give ${key}From and ${key}To, the first below the second`,
      );
    }
    return { index, from, to };
  };
  const x = axis('x');
  const y = axis('y');
  if (x === undefined || y === undefined) return undefined;
  return {
    x: x.index,
    xFrom: x.from,
    xTo: x.to,
    y: y.index,
    yFrom: y.from,
    yTo: y.to,
    columns: map.columns ?? MAP_DEFAULTS.columns,
    rows: map.rows ?? MAP_DEFAULTS.rows,
    measure: map.measure ?? MAP_DEFAULTS.measure,
    others: map.others ?? MAP_DEFAULTS.others,
  };
}

/** The band widened by half its width on each side, an exact nominal ± 50 %, within minimum and maximum. */
function defaultRange(parameter: ComposedParameter): { from: number; to: number } {
  const { nominal, low, high, minimum, maximum, hasBand } = parameter;
  const margin = WIDENING * (hasBand ? high - low : Math.abs(nominal));
  return { from: Math.max(minimum, low - margin), to: Math.min(maximum, high + margin) };
}
