import { BOX_LIMIT, contactSearch } from '../contact/contact-search';
import type { Contact, TwoSided } from '../contact/contact';
import { SampledRequirement } from '../contact/sampled-requirement';
import { sampledSearch } from '../contact/sampled-search';
import type { ProvableRequirement, SearchedRequirement } from '../contact/searched-requirement';
import {
  bandsFamily,
  payloadFamily,
  type SearchFamily,
  sliceFamily,
  stretchFamily,
} from '../contact/search-family';
import type { ComposedRequirement, ComposedStudy } from '../study';
import { snapToUnits } from './in-units';
import type { LoopModel } from './loop-model';
import { searchOrder } from './requirement-list';
import type { SearchSpace } from './search-variables';

/** Largest factor by which bands are stretched (study format). */
export const LARGEST_STRETCH = 10;

/** The searches of one study under one set of requirements. */
export class AnswerSearch {
  /** Whether answers are proved; otherwise they are sampled. */
  readonly proved: boolean;
  private readonly problems: ProvableRequirement[] = [];
  private readonly sampled: SampledRequirement[];

  /** @throws ExpansionLimitError where the loop is too large to expand */
  constructor(
    private readonly study: ComposedStudy,
    private readonly space: SearchSpace,
    model: LoopModel,
    requirements: readonly ComposedRequirement[],
    widest: readonly number[],
    private readonly work: { boxes: number },
  ) {
    const ordered = searchOrder(requirements);
    for (const requirement of ordered) {
      const problem = model.problem(requirement, widest);
      if (problem !== undefined) this.problems.push(problem);
    }
    this.proved = this.problems.length === ordered.length;
    if (this.proved) this.problems.unshift(...model.divisorProblems(ordered[0].law, widest));
    this.sampled = ordered.map(
      ({ measure, limit, law }) => new SampledRequirement(measure, limit, model.probe(law)),
    );
  }

  /** A contact at the nominal point itself, where a requirement is not kept there. */
  nominalContact(): Contact | undefined {
    const { nominal } = this.space;
    const outside = this.proved
      ? this.problems.find((problem) => !problem.isInside(nominal) || failsAt(problem, nominal))
      : this.sampled.find((problem) => failsAt(problem, nominal));
    return outside && { objective: 0, point: nominal.slice(), problem: outside };
  }

  *payload(end: number): Generator<void, TwoSided> {
    const { variables, payload } = this.space;
    return yield* this.run(payloadFamily(variables, payload, end), sliceFamily(variables, payload));
  }

  *stretch(): Generator<void, TwoSided> {
    return yield* this.run(stretchFamily(this.space.variables, LARGEST_STRETCH), undefined);
  }

  *bands(): Generator<void, TwoSided> {
    return yield* this.run(bandsFamily(this.space.variables), undefined);
  }

  private *run(family: SearchFamily, slice: SearchFamily | undefined): Generator<void, TwoSided> {
    const snap = (point: Float64Array): void => snapToUnits(this.study.parameters, this.space, point);
    if (!this.proved) return yield* sampledSearch(this.sampled, family, snap, this.work);
    const context = { problems: this.problems, snap, work: this.work, boxLimit: BOX_LIMIT };
    return yield* contactSearch(context, family, slice);
  }
}

function failsAt(problem: SearchedRequirement, point: Float64Array): boolean {
  return problem.value(point) < 0 && problem.failsCertainly(point) !== undefined;
}
