import { readStudyValue, type Result } from '../../../shared/contracts';
import { analyse, composeStudy } from '../../../shared/engine';
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

/** The result of a study by the whole path: as JSON text, read, composed, analysed. */
export function resultOf(model: StudyModel): Result {
  const { study } = readStudyValue(JSON.parse(JSON.stringify(studyJson(model))));
  return analyse(composeStudy(study), { studyHash: '', clock: () => performance.now(), map: false });
}

/** Analyses a study, attacks everything that is claimed to hold and checks everything that is said to fail. */
export function attackMachine(model: StudyModel, seed: number, effort: AttackEffort): AttackOutcome {
  const result = resultOf(model);
  const attack = new BoxAttack(model, new SeededRandom(seed ^ 0x5bd1e995), effort);
  for (const box of claimedBoxes(model, result)) attack.attack(box);
  return { result, failures: attack.failures, faults: checkAnswers(model, result) };
}
