import type { MapAnswer } from '../../../shared/contracts';
import type { ComposedStudy } from '../../../shared/engine';
import { AnswerSearch } from '../../../shared/engine/analysis/answer-search';
import { inUnit } from '../../../shared/engine/analysis/in-units';
import { LoopModel } from '../../../shared/engine/analysis/loop-model';
import { nominalAnswer } from '../../../shared/engine/analysis/nominal-answer';
import { searchSpace } from '../../../shared/engine/analysis/search-variables';
import { sweepMap } from '../../../shared/engine/sweep/sweep-map';

type ComposedMap = NonNullable<ComposedStudy['map']>;

/** The decay rate that a study's map is measured by, counted as exactly as the analysis counts it. */
function nominalDecayRate(study: ComposedStudy): number {
  const space = searchSpace(study);
  const model = new LoopModel(study, space);
  const law = study.loop.laws.length > 0 ? 0 : -1;
  const widest = space.variables.map(({ nominal, low, high }) =>
    Math.max(Math.abs(nominal), Math.abs(low), Math.abs(high)),
  );
  const stability = [{ measure: 'stability', limit: 0, law } as const];
  const search = new AnswerSearch(study, space, model, stability, widest, { boxes: 0 });
  const stable = search.proved ? search.nominalContact() === undefined : undefined;
  return nominalAnswer(model.probe(law), space.nominal, stable)?.decayRate ?? 0;
}

/** The map of a study apart from its analysis, with the same digits. */
export class MapCourse {
  private readonly decayRate: number;

  /** @throws ExpansionLimitError where the loop is too large to expand */
  constructor(private readonly study: ComposedStudy) {
    this.decayRate = nominalDecayRate(study);
  }

  /** Yields once per node. */
  *sweep(map: ComposedMap): Generator<void, MapAnswer> {
    const { parameters } = this.study;
    const { x, y, values } = yield* sweepMap(this.study, map, this.decayRate);
    return {
      x: x.map((value) => inUnit(parameters[map.x], value)),
      y: y.map((value) => inUnit(parameters[map.y], value)),
      measure: map.measure,
      ...(map.others === 'anywhere' && { others: map.others, proof: 'sampled' as const }),
      values,
    };
  }
}
