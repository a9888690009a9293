import type { MapAnswer } from '../../contracts';
import { haltonPoint } from '../contact/low-discrepancy';
import { LoopProbe } from '../contact/loop-probe';
import { buildLoop } from '../loop/build-loop';
import { NominalValues } from '../loop/nominal-values';
import type { ComposedMap, ComposedStudy } from '../study';
import { lawOfMeasure, mapValue } from './map-measure';

/** Points of the low-discrepancy set that are tried beside the corners where the others are anywhere. */
const SAMPLES_ANYWHERE = 32;
/** Most corners of the others that are tried. */
const MOST_CORNERS = 64;

/**
 * The values of a map at its nodes, ends included; axes in SI units. With the others anywhere in their bands a cell
 * shows the least value over their corners and a fixed low-discrepancy set: sampled. Yields once per node.
 */
export function* sweepMap(
  study: ComposedStudy,
  map: ComposedMap,
  nominalDecayRate: number,
): Generator<void, Pick<MapAnswer, 'values'> & { x: number[]; y: number[] }> {
  const nominal = study.parameters.map(({ nominal: value }) => value);
  const varying = study.parameters
    .map((_, index) => index)
    .filter((i) => study.parameters[i].hasBand || i === study.payload || i === map.x || i === map.y);
  const others = varying.filter((i) => i !== map.x && i !== map.y && study.parameters[i].hasBand);
  const constants = new NominalValues(study.program, nominal, (parameter) => varying.includes(parameter));
  const loop = buildLoop(study.loop, (node) => constants.constant(node));
  const probes = new Map<number, LoopProbe>();
  const visited = new Set<number>();
  const point = Float64Array.from(nominal);
  const every = nominal.map((_, index) => index);
  const visit = (law: number): LoopProbe => {
    let probe = probes.get(law);
    if (probe === undefined) probes.set(law, (probe = new LoopProbe(loop, law, nominal, every)));
    if (!visited.has(law)) {
      probe.visit(point);
      visited.add(law);
    }
    return probe;
  };
  const context = { requirements: study.requirements, nominalDecayRate, visit };
  const law = lawOfMeasure(map.measure, study.requirements, study.loop.laws.length);
  const placements = map.others === 'anywhere' ? placementsOf(study, others) : [nominal];
  const x = nodes(map.xFrom, map.xTo, map.columns);
  const y = nodes(map.yFrom, map.yTo, map.rows);
  const values: (number | null)[][] = [];
  for (const yValue of y) {
    const row: (number | null)[] = [];
    for (const xValue of x) {
      let least = Infinity;
      for (const placement of placements) {
        point.set(placement);
        point[map.x] = xValue;
        point[map.y] = yValue;
        visited.clear();
        // NaN, an unstable point, is worse than any value and stays.
        least = Math.min(least, mapValue(map.measure, law, context));
      }
      row.push(Number.isFinite(least) ? least : null);
      yield;
    }
    values.push(row);
  }
  return { x, y, values };
}

function nodes(from: number, to: number, count: number): number[] {
  return Array.from({ length: count }, (_, i) =>
    i === count - 1 ? to : from + (i * (to - from)) / (count - 1),
  );
}

/** Parameter vectors with the others at nominal, at corners of their bands, and at low-discrepancy points. */
function placementsOf(study: ComposedStudy, others: readonly number[]): number[][] {
  const nominal = study.parameters.map(({ nominal: value }) => value);
  const placements = [nominal];
  const corners = Math.min(MOST_CORNERS, 1 << Math.min(others.length, 30));
  for (let corner = 0; corner < corners; corner++) {
    const placement = nominal.slice();
    others.forEach((parameter, bit) => {
      const { low, high } = study.parameters[parameter];
      placement[parameter] = ((corner >> bit) & 1) === 1 ? high : low;
    });
    placements.push(placement);
  }
  const fractions = new Float64Array(others.length);
  for (let index = 1; index <= SAMPLES_ANYWHERE && others.length > 0; index++) {
    haltonPoint(index, fractions);
    const placement = nominal.slice();
    others.forEach((parameter, i) => {
      const { low, high } = study.parameters[parameter];
      placement[parameter] = low + fractions[i] * (high - low);
    });
    placements.push(placement);
  }
  return placements;
}
