import { AnswerSearch, LARGEST_STRETCH } from '../../shared/engine/analysis/answer-search';
import { LoopModel } from '../../shared/engine/analysis/loop-model';
import { searchSpace } from '../../shared/engine/analysis/search-variables';
import type { ComposedStudy } from '../../shared/engine';

/** The searches of a study one by one, as an analysis makes them, with a count of their boxes. */
export class StudySearch {
  readonly work = { boxes: 0 };
  readonly space;
  readonly model: LoopModel;
  readonly widest: readonly number[];
  readonly searchedUpTo: number;
  readonly searchedDownTo: number;
  readonly search: AnswerSearch;

  constructor(readonly study: ComposedStudy) {
    this.space = searchSpace(study);
    this.model = new LoopModel(study, this.space);
    const payload = study.payload === undefined ? undefined : study.parameters[study.payload];
    this.searchedUpTo = Math.min(study.searchUpTo ?? 5 * (payload?.high ?? 0), payload?.maximum ?? 0);
    this.searchedDownTo = study.searchDownTo ?? Math.max(0, payload?.minimum ?? 0);
    this.widest = this.space.variables.map(({ nominal, low, high, stretches }, i) => {
      const reach = stretches ? LARGEST_STRETCH : 1;
      const side = Math.max(high - nominal, nominal - low);
      return Math.max(Math.abs(nominal) + reach * side, i === this.space.payload ? this.searchedUpTo : 0);
    });
    this.search = new AnswerSearch(study, this.space, this.model, study.requirements, this.widest, this.work);
  }
}
