import {
  type BandsAnswer,
  type DelayAnswer,
  type RatingAnswer,
  type Result,
  StudyFaultError,
  type UpwardAnswer,
} from '../../contracts';
import { ExpansionLimitError } from '../../expressions';
import type { Contact, TwoSided } from '../contact/contact';
import { limitingFrequency } from '../contact/requirement-value';
import { evaluateExactly } from '../polynomial/exact-point';
import type { ComposedRequirement, ComposedStudy } from '../study';
import { AnswerSearch, LARGEST_STRETCH } from './answer-search';
import { delayAnswer } from './delay-answer';
import { ENGINE_VERSION } from './engine-version';
import { inUnit, snapToUnits } from './in-units';
import { LoopModel } from './loop-model';
import { mapInSteps } from './map-course';
import { marginLaw } from './margin-law';
import { nominalAnswer } from './nominal-answer';
import { type RatedLimit, ratingAnswer } from './rating-answer';
import { type SearchSpace, searchSpace } from './search-variables';
import { AnswerFormat } from './two-sided-answers';
import { worstPoint } from './worst-point';

/** What is known of a result while the rest is still being computed. */
export type AnswersSoFar = Pick<Result, 'nominal' | 'bands' | 'largestPayload' | 'rating'>;

export interface AnalysisOptions {
  /** `sha256:` and the hash of the study's canonical text: the caller hashes, the engine has no such means. */
  readonly studyHash: string;
  /** Milliseconds of a clock of the caller's, for `work` alone. */
  readonly clock: () => number;
  /** Whether the map is computed too. */
  readonly map: boolean;
  /**
   * Told the answers that a hand waits for as soon as they are known: first without the rating where that needs
   * searches of its own, then with it. The verdict told here comes from a search of the bands as they stand, since
   * the band stretch is not known yet: its failing point may be another than the result's. The result is the same
   * with and without, `work` aside.
   */
  readonly onAnswer?: (known: AnswersSoFar) => void;
}

/** What an answer with the nominal point failing looks like. */
const NOTHING = { provedTo: undefined, openShare: undefined, openMeasure: undefined };

/**
 * The whole analysis as a resumable course: it yields after every box, sample or map node, and returns the result.
 * When it is resumed, how often and by whom changes no digit of the answers.
 *
 * @throws StudyFaultError where the loop is too large to expand or has no proper form at the nominal point
 */
export function* analyseInSteps(study: ComposedStudy, options: AnalysisOptions): Generator<void, Result> {
  try {
    return yield* new Analysis(study, options).run();
  } catch (error) {
    if (!(error instanceof ExpansionLimitError)) throw error;
    throw new StudyFaultError([
      { path: 'machine', message: `is too large to expand exactly: ${error.message}` },
    ]);
  }
}

/** The analysis without a pause. */
export function analyse(study: ComposedStudy, options: AnalysisOptions): Result {
  const course = analyseInSteps(study, options);
  for (;;) {
    const { done, value } = course.next();
    if (done === true) return value;
  }
}

class Analysis {
  private readonly space: SearchSpace;
  private readonly model: LoopModel;
  private readonly widest: number[];
  private readonly work = { boxes: 0 };
  private readonly searchedUpTo: number;
  private searchedDownTo: number;

  constructor(
    private readonly study: ComposedStudy,
    private readonly options: AnalysisOptions,
  ) {
    this.space = searchSpace(study);
    this.model = new LoopModel(study, this.space);
    const payload = study.payload === undefined ? undefined : study.parameters[study.payload];
    const high = payload?.high ?? 0;
    const low = Math.max(0, payload?.minimum ?? 0);
    this.searchedUpTo = Math.max(high, Math.min(study.searchUpTo ?? 5 * high, payload?.maximum ?? high));
    this.searchedDownTo = Math.min(study.searchDownTo ?? low, payload?.low ?? low);
    this.widest = this.space.variables.map((variable, i) => {
      const { nominal, low: bandLow, high: bandHigh, stretches } = variable;
      const reach = stretches ? LARGEST_STRETCH : 1;
      const widest = Math.max(
        Math.abs(nominal + reach * (bandHigh - nominal)),
        Math.abs(nominal - reach * (nominal - bandLow)),
      );
      return i === this.space.payload ? Math.max(widest, Math.abs(this.searchedUpTo)) : widest;
    });
  }

  *run(): Generator<void, Result> {
    const { study, space, options } = this;
    const start = options.clock();
    const law = marginLaw(study);
    const search = this.searchFor(study.requirements);
    const nominal = nominalAnswer(this.model, space, law);
    if (nominal === undefined) {
      throw new StudyFaultError([
        {
          path: 'machine',
          message: 'the loop has no proper form at the nominal point: its leading coefficient is 0',
        },
      ]);
    }
    const proof = search.proved ? 'proved' : 'sampled';
    const format = new AnswerFormat(study.parameters, space, proof, study.boundsUndecided);
    const failing = search.nominalContact();
    if (this.study.searchDownTo === undefined) this.searchedDownTo = this.defaultLowerEnd();
    const hasPayload = space.payload >= 0;
    const largest = hasPayload
      ? yield* this.orFailing(failing, () => search.payload(this.searchedUpTo))
      : undefined;
    const largestPayload = largest && format.largest(largest, this.searchedUpTo);
    const { onAnswer } = options;
    const asTheyStand = onAnswer && (yield* this.orFailing(failing, () => search.bands()));
    const known = asTheyStand && {
      nominal,
      bands: this.bandsAnswer(format, asTheyStand),
      largestPayload: largestPayload ?? null,
    };
    if (known !== undefined && this.hasRatingSearches) onAnswer?.(known);
    const rating = largestPayload && (yield* this.rating(largestPayload));
    if (known !== undefined) onAnswer?.({ ...known, ...(rating && { rating }) });
    const smallest = hasPayload
      ? yield* this.orFailing(failing, () => search.payload(this.searchedDownTo))
      : undefined;
    const stretch = yield* this.orFailing(failing, () => search.stretch());
    const bands = yield* this.verdict(search, format, stretch, asTheyStand);
    const delay = this.delay(largest ?? stretch, nominal.phaseMargin);
    const map =
      options.map && study.map !== undefined
        ? yield* mapInSteps(study, study.map, nominal.decayRate ?? 0)
        : undefined;
    return {
      format: 'tareline-result',
      version: 1,
      engine: ENGINE_VERSION,
      studyHash: options.studyHash,
      nominal,
      bands,
      largestPayload: largestPayload ?? null,
      smallestPayload: (smallest && format.smallest(smallest, this.searchedDownTo)) ?? null,
      bandStretch: space.variables.length === 0 ? null : format.stretch(stretch, LARGEST_STRETCH),
      ...(rating && { rating }),
      ...(delay && { delay }),
      ...(map && { map }),
      ...(study.warnings.length > 0 && { warnings: [...study.warnings] }),
      work: { boxes: this.work.boxes, milliseconds: options.clock() - start },
    };
  }

  private searchFor(requirements: readonly ComposedRequirement[]): AnswerSearch {
    return new AnswerSearch(this.study, this.space, this.model, requirements, this.widest, this.work);
  }

  private *orFailing(
    failing: Contact | undefined,
    search: () => Generator<void, TwoSided>,
  ): Generator<void, TwoSided> {
    return failing === undefined ? yield* search() : { ...NOTHING, contact: failing };
  }

  /**
   * The band stretch decides the verdict unless factor 1 lies between its two sides.
   *
   * @param asTheyStand the search of the bands, where it has been made already
   */
  private *verdict(
    search: AnswerSearch,
    format: AnswerFormat,
    stretch: TwoSided,
    asTheyStand: TwoSided | undefined,
  ): Generator<void, BandsAnswer> {
    const { contact, provedTo } = stretch;
    if (contact !== undefined && contact.objective <= 1) return this.bandsAnswer(format, stretch);
    if (provedTo !== undefined && provedTo >= 1)
      return format.bands({ ...stretch, contact: undefined, openShare: undefined });
    return this.bandsAnswer(format, asTheyStand ?? (yield* search.bands()));
  }

  /** The verdict from a search, its failing point moved to where the requirement is missed most. */
  private bandsAnswer(format: AnswerFormat, answer: TwoSided): BandsAnswer {
    if (answer.contact === undefined) return format.bands(answer);
    const snap = (point: Float64Array): void => snapToUnits(this.study.parameters, this.space, point);
    return format.failing(worstPoint(answer.contact, this.space, snap));
  }

  private get hasRatingSearches(): boolean {
    const { rating, payload } = this.study;
    return payload !== undefined && rating?.tests.some(({ requirements }) => requirements) === true;
  }

  private *rating(largest: UpwardAnswer): Generator<void, RatingAnswer | undefined> {
    const { rating, parameters, payload } = this.study;
    if (rating === undefined || payload === undefined) return undefined;
    const parameter = parameters[payload];
    const limits: RatedLimit[] = [{ name: null, factor: 1, provedTo: largest.provedTo }];
    for (const { name, factor, requirements } of rating.tests) {
      let provedTo = largest.provedTo;
      if (requirements !== undefined) {
        const search = this.searchFor(requirements);
        const answer = yield* this.orFailing(search.nominalContact(), () =>
          search.payload(this.searchedUpTo),
        );
        const proof = search.proved ? 'proved' : 'sampled';
        const format = new AnswerFormat(parameters, this.space, proof, this.study.boundsUndecided);
        provedTo = format.largest(answer, this.searchedUpTo).provedTo;
      }
      limits.push({ name, factor, provedTo });
    }
    const step = rating.step === undefined ? undefined : inUnit(parameter, rating.step);
    return ratingAnswer(limits, step);
  }

  private delay(answer: TwoSided, nominalPhaseMargin: number | null): DelayAnswer | undefined {
    const law = marginLaw(this.study);
    const { contact } = answer;
    const parameters = this.model.nominalParameters.slice();
    let frequency: number | null = null;
    if (contact !== undefined) {
      this.space.parameters.forEach((parameter, i) => (parameters[parameter] = contact.point[i]));
      contact.problem.probe.visit(contact.point);
      frequency = limitingFrequency(contact.problem.probe, contact.problem.measure);
    } else if (nominalPhaseMargin !== null) {
      const probe = this.model.probe(law);
      probe.visit(this.space.nominal);
      const crossover = probe.withMargins()?.phaseMargin().frequency ?? NaN;
      frequency = Number.isFinite(crossover) ? crossover : null;
    }
    return delayAnswer(this.model.loop, law, parameters, frequency);
  }

  /** 0, or nominal/1000 where the loop loses its order there: a mass matrix that is singular without a payload. */
  private defaultLowerEnd(): number {
    const { space, searchedDownTo } = this;
    if (space.payload < 0) return searchedDownTo;
    const polynomial = this.model.polynomial(marginLaw(this.study));
    const point = space.nominal.slice();
    point[space.payload] = searchedDownTo;
    if (polynomial === undefined) {
      const probe = this.model.probe(marginLaw(this.study));
      probe.visit(point);
      return probe.regular ? searchedDownTo : space.nominal[space.payload] / 1000;
    }
    const { broken, returned } = evaluateExactly(polynomial, point);
    const last = broken.length - 1;
    return broken[last] + returned[last] === 0n ? space.nominal[space.payload] / 1000 : searchedDownTo;
  }
}
