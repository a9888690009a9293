import type { Result } from '../../../shared/contracts';
import { analyseValue } from './analyse-value';
import { type AttackEffort, BoxAttack, type FoundFailure } from './attack-box';
import { checkAnswers } from './check-answers';
import { claimedBoxes } from './claimed-boxes';
import { SeededRandom } from './seeded-random';
import { studyJson } from './study-json';
import type { StudyModel } from './study-model';

export interface AttackOutcome {
  readonly result: Result;
  readonly failures: readonly FoundFailure[];
  readonly faults: readonly string[];
}

export const resultOf = (model: StudyModel): Result => analyseValue(studyJson(model));

/** Analyses a study, attacks everything that is claimed to hold and checks everything that is said to fail. */
export function attackMachine(model: StudyModel, seed: number, effort: AttackEffort): AttackOutcome {
  const result = resultOf(model);
  const attack = new BoxAttack(model, new SeededRandom(seed ^ 0x5bd1e995), effort);
  for (const box of claimedBoxes(model, result)) attack.attack(box);
  return { result, failures: attack.failures, faults: checkAnswers(model, result) };
}
