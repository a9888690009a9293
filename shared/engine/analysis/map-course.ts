import type { MapAnswer } from '../../contracts';
import type { ComposedMap, ComposedStudy } from '../study';
import { sweepMap } from '../sweep/sweep-map';
import { inUnit } from './in-units';
import { LoopModel } from './loop-model';
import { marginLaw } from './margin-law';
import { nominalAnswer } from './nominal-answer';
import { searchSpace } from './search-variables';

/** The map as the result shows it, axes in the units of their parameters. Yields once per node. */
export function* mapInSteps(
  study: ComposedStudy,
  map: ComposedMap,
  nominalDecayRate: number,
): Generator<void, MapAnswer> {
  const { parameters } = study;
  const { x, y, values } = yield* sweepMap(study, map, nominalDecayRate);
  return {
    x: x.map((value) => inUnit(parameters[map.x], value)),
    y: y.map((value) => inUnit(parameters[map.y], value)),
    measure: map.measure,
    ...(map.others === 'anywhere' && { others: map.others, proof: 'sampled' as const }),
    values,
  };
}

/** The map of a study apart from its analysis, with the same digits. */
export class MapCourse {
  private readonly decayRate: number;

  /** @throws ExpansionLimitError where the loop is too large to expand */
  constructor(private readonly study: ComposedStudy) {
    const space = searchSpace(study);
    this.decayRate = nominalAnswer(new LoopModel(study, space), space, marginLaw(study))?.decayRate ?? 0;
  }

  /** Yields once per node; grids of any size may follow one another. */
  sweep(map: ComposedMap): Generator<void, MapAnswer> {
    return mapInSteps(this.study, map, this.decayRate);
  }
}
