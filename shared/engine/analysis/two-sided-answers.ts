import type { BandsAnswer, DownwardAnswer, Proof, UpwardAnswer } from '../../contracts';
import type { Contact, TwoSided } from '../contact/contact';
import { limitingFrequency, measureAt } from '../contact/requirement-value';
import type { ComposedParameter } from '../study';
import { inUnit, inUnitDown, inUnitUp, witnessRecord } from './in-units';
import type { SearchSpace } from './search-variables';

const THROUGH_INFINITY = 'a pole leaves through infinity';

/** Turns what the searches found into the answers of the result. */
export class AnswerFormat {
  constructor(
    private readonly parameters: readonly ComposedParameter[],
    private readonly space: SearchSpace,
    private readonly proof: Proof,
    /** Interval arithmetic could not show that every expression is defined on the bands: nothing is claimed there. */
    private readonly boundsUndecided: boolean,
  ) {}

  /** The requirement, the failing point and its frequency. */
  private failure({
    problem,
    point,
  }: Contact): Pick<UpwardAnswer, 'requirement' | 'witness' | 'frequency' | 'reason'> {
    const witness = witnessRecord(this.parameters, this.space, point);
    if (problem.failsCertainly(point)?.throughInfinity === true) {
      return { requirement: 'stability', witness, frequency: null, reason: THROUGH_INFINITY };
    }
    problem.probe.visit(point);
    return {
      requirement: problem.measure,
      witness,
      frequency: limitingFrequency(problem.probe, problem.measure),
    };
  }

  private payloadParameter(): ComposedParameter {
    return this.parameters[this.space.parameters[this.space.payload]];
  }

  largest(answer: TwoSided, searchedUpTo: number): UpwardAnswer {
    const payload = this.payloadParameter();
    // The end of the search is the study's own number: rounding it to the safe side would make it another.
    const end = inUnit(payload, searchedUpTo);
    const value = (objective: number): number =>
      objective >= searchedUpTo - payload.nominal ? end : inUnitDown(payload, payload.nominal + objective);
    return { ...this.sides(answer, value, this.payloadOf(answer)), searchedUpTo: end };
  }

  smallest(answer: TwoSided, searchedDownTo: number): DownwardAnswer {
    const payload = this.payloadParameter();
    const end = inUnit(payload, searchedDownTo);
    const value = (objective: number): number =>
      objective >= payload.nominal - searchedDownTo ? end : inUnitUp(payload, payload.nominal - objective);
    return { ...this.sides(answer, value, this.payloadOf(answer)), searchedDownTo: end };
  }

  stretch(answer: TwoSided, searchedUpTo: number): UpwardAnswer {
    return { ...this.sides(answer, (objective) => objective, answer.contact?.objective), searchedUpTo };
  }

  private payloadOf({ contact }: TwoSided): number | undefined {
    return contact && inUnit(this.payloadParameter(), contact.point[this.space.payload]);
  }

  private sides(
    { provedTo, contact, openShare, openMeasure }: TwoSided,
    provedValue: (objective: number) => number,
    failsAt: number | undefined,
  ): Omit<UpwardAnswer, 'searchedUpTo'> {
    const { proof } = this;
    if (this.boundsUndecided) return { provedTo: null, failsAt: null, proof, undecided: true };
    const proved = provedTo === undefined ? null : provedValue(provedTo);
    if (openShare !== undefined && proved !== null) {
      // A failing point further out does not bound what is undecided: it is told apart from the answer.
      return { provedTo: proved, failsAt: null, proof, undecided: true, openShare, requirement: openMeasure };
    }
    if (contact === undefined || failsAt === undefined) return { provedTo: proved, failsAt: null, proof };
    return { provedTo: proved, failsAt, proof, ...this.failure(contact) };
  }

  /** The verdict on the bands from a search of exactly these bands. */
  bands(answer: TwoSided): BandsAnswer {
    const { proof } = this;
    if (answer.contact !== undefined) return this.failing(answer.contact);
    if (answer.openShare !== undefined || this.boundsUndecided) {
      return { verdict: 'undecided', proof, requirement: answer.openMeasure, openShare: answer.openShare };
    }
    return { verdict: 'holds', proof };
  }

  failing(contact: Contact): BandsAnswer {
    const failure = this.failure(contact);
    contact.problem.probe.visit(contact.point);
    const value = measureAt(contact.problem.probe, failure.requirement ?? contact.problem.measure);
    return { verdict: 'fails', proof: this.proof, ...failure, value };
  }
}
