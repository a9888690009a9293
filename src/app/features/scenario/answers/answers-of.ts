import type { Parameter, Result, Study } from '../../../../../shared/contracts';
import type { RunSummary } from '../../../../../shared/contracts/api';
import {
  failsAbove,
  failsBelow,
  measureWords,
  plainFigure,
  provedFrom,
  provedTo,
  reserveFigure,
  reserveOf,
  withUnit,
  type VerdictFacts,
} from '../../../core/answers';
import type { GaugeTest, PayloadRanges } from '../../../ui/figures';
import { rangesOf } from './payload-ranges';

export interface Fact {
  readonly label: string;
  readonly text: string;
}

/** A run's answers in the words and figures of the page. */
export interface Answers {
  readonly unit: string | undefined;
  /** The answer of the page in one sentence. */
  readonly sentence: string;
  readonly verdict: VerdictFacts;
  /** Undefined where the study names no payload. */
  readonly ranges: PayloadRanges | undefined;
  readonly provedTo: string | undefined;
  readonly failsAt: string | undefined;
  readonly figures: readonly Fact[];
  readonly facts: readonly Fact[];
  readonly tests: readonly GaugeTest[];
  readonly failingPoint: readonly Fact[];
  readonly insidePoint: readonly Fact[];
  readonly approximated: boolean;
  readonly sampled: boolean;
}

type Rated = Pick<RunSummary, 'ratedLow' | 'ratedHigh'> | undefined;

/** @param rated the rated range as the server evaluated it, in the payload's unit */
export function answersOf(result: Result, study: Study, rated: Rated): Answers {
  const payload = study.parameters.find(({ id }) => id === study.payload);
  const unit = payload?.unit;
  const approximated = result.delay !== undefined;
  const sampled = (result.largestPayload?.proof ?? result.bands.proof) === 'sampled';
  const ranges = rangesOf(result, ratedRange(rated));
  const largest = result.largestPayload;
  const smallest = result.smallestPayload;
  const limiting = largest?.witness === undefined ? smallest : largest;
  return {
    unit,
    approximated,
    sampled,
    ranges,
    sentence: sentenceOf(result, unit, approximated),
    verdict: { verdict: result.bands.verdict, proof: result.bands.proof, approximated },
    provedTo: largest === null || largest.provedTo === null ? undefined : provedTo(largest.provedTo),
    failsAt: largest === null || largest.failsAt === null ? undefined : failsAbove(largest.failsAt),
    figures: figuresOf(result, study, ranges, unit),
    facts: factsOf(result, limiting),
    tests: testsOf(result, study),
    failingPoint: pointOf(study, limiting?.witness, limiting === largest ? failsAbove : failsBelow),
    insidePoint: pointOf(study, result.bands.witness),
  };
}

function ratedRange(rated: Rated): PayloadRanges['rated'] {
  if (rated === undefined || rated.ratedLow === null || rated.ratedHigh === null) return undefined;
  return { low: rated.ratedLow, high: rated.ratedHigh };
}

function sentenceOf(result: Result, unit: string | undefined, approximated: boolean): string {
  const largest = result.largestPayload;
  const smallest = result.smallestPayload;
  if (largest === null) return verdictSentence(result, approximated);
  if (largest.provedTo === null) {
    return largest.failsAt === null
      ? 'Nothing is proved: at the nominal payload itself the bands are neither proved nor refuted.'
      : `Nothing is proved: it fails at the nominal payload of ${withUnit(plainFigure(largest.failsAt), unit)}.`;
  }
  const word = largest.proof === 'sampled' ? 'Sampled, not proved,' : 'Proved';
  const fromLow = smallest !== null && smallest.provedTo !== null && smallest.provedTo > 0;
  const from = fromLow ? `from ${provedFrom(smallest.provedTo ?? 0)} ` : '';
  const delay = approximated && largest.proof === 'proved' ? ' for the approximated delay' : '';
  const start = `${word}${delay} ${from}to ${withUnit(provedTo(largest.provedTo), unit)}`;
  const below = smallest === null || smallest.failsAt === null ? [] : [failsBelow(smallest.failsAt)];
  if (largest.failsAt !== null) {
    const points = [...below, failsAbove(largest.failsAt)].join(' and at ');
    return `${start}; fails at ${withUnit(points, unit)}.`;
  }
  const light = below.length === 0 ? '' : `; fails at ${withUnit(below[0], unit)}`;
  return largest.undecided
    ? `${start}, beyond it neither proved nor refuted${light}.`
    : `${start}, where the search ends and nothing heavier is known to fail${light}.`;
}

function verdictSentence(result: Result, approximated: boolean): string {
  const word = result.bands.proof === 'sampled' ? 'at every sample' : 'everywhere';
  const delay = approximated ? ', proved for the approximated delay' : '';
  switch (result.bands.verdict) {
    case 'holds':
      return `Holds ${word} in the bands${delay}. The study names no payload.`;
    case 'fails':
      return 'Fails inside the bands. The study names no payload.';
    case 'undecided':
      return 'Neither proved nor refuted inside the bands. The study names no payload.';
  }
}

function figuresOf(
  result: Result,
  study: Study,
  ranges: PayloadRanges | undefined,
  unit: string | undefined,
): Fact[] {
  const facts: Fact[] = [];
  if (ranges?.rated !== undefined) {
    const { low, high } = ranges.rated;
    facts.push({ label: 'Rated range', text: `${plainFigure(low)} to ${withUnit(plainFigure(high), unit)}` });
  }
  const reserve = ranges && reserveOf(ranges);
  if (reserve !== undefined) facts.push({ label: 'Reserve', text: withUnit(reserveFigure(reserve), unit) });
  const smallest = result.smallestPayload;
  if (smallest !== null && smallest.failsAt !== null) {
    facts.push({ label: 'Light end fails at', text: withUnit(failsBelow(smallest.failsAt), unit) });
  }
  if (result.rating !== undefined) {
    const { allowed, plate, limitedBy } = result.rating;
    const value = plate ?? allowed;
    const test = study.rating?.tests?.find(({ name }) => name === limitedBy);
    facts.push({
      label: test === undefined ? 'Plate' : `Plate, with the ${test.name} test ×\u00a0${test.factor}`,
      text: value === null ? 'none' : withUnit(provedTo(value), unit),
    });
  }
  return facts;
}

function factsOf(result: Result, limiting: Result['largestPayload'] | Result['smallestPayload']): Fact[] {
  const facts: Fact[] = [];
  const stretch = result.bandStretch;
  if (stretch !== null) {
    const all = stretch.failsAt === null && stretch.provedTo === stretch.searchedUpTo;
    const text =
      stretch.provedTo === null
        ? 'not at all'
        : `${all ? 'at least ' : ''}×\u00a0${provedTo(stretch.provedTo, 3)}`;
    facts.push({ label: 'Bands may grow together', text });
  }
  const first = limiting?.requirement ?? result.bands.requirement;
  if (first !== undefined) facts.push({ label: 'First to go', text: measureWords(first) });
  const frequency = limiting?.frequency;
  if (frequency !== undefined && frequency !== null) {
    const hertz = plainFigure(Number((frequency / (2 * Math.PI)).toPrecision(3)));
    facts.push({
      label: 'Critical frequency',
      text: `${withUnit(hertz, 'Hz')}, ${withUnit(plainFigure(Number(frequency.toPrecision(3))), 'rad/s')}`,
    });
  }
  if (limiting?.reason !== undefined) facts.push({ label: 'Why', text: limiting.reason });
  const shortfall = result.delay?.phaseShortfall;
  if (shortfall !== undefined && shortfall !== null) {
    facts.push({ label: 'Delay form falls short by', text: withUnit(plainFigure(shortfall), 'rad') });
  }
  return facts;
}

/** The payloads that the tests load the machine with at the plate value. */
function testsOf(result: Result, study: Study): GaugeTest[] {
  const plate = result.rating?.plate;
  if (plate === undefined || plate === null) return [];
  return (study.rating?.tests ?? []).flatMap(({ factor }) =>
    typeof factor === 'number' ? [{ at: plate * factor, label: String(factor) }] : [],
  );
}

/**
 * A point of the bands: each parameter with its value and whether that is an end of its band. At a limit of the
 * payload that figure is rounded as the limit is.
 */
function pointOf(
  study: Study,
  witness: Record<string, number> | undefined,
  limitFigure?: (value: number) => string,
): Fact[] {
  if (witness === undefined) return [];
  return study.parameters.flatMap((parameter) => {
    const value = witness[parameter.id];
    if (value === undefined) return [];
    const label = parameter.label ?? parameter.id;
    if (limitFigure !== undefined && parameter.id === study.payload) {
      return [{ label, text: `${withUnit(limitFigure(value), parameter.unit)}, limit` }];
    }
    const end = endOf(parameter, value);
    const figure = withUnit(plainFigure(value), parameter.unit);
    return [{ label, text: end === '' ? figure : `${figure}, ${end}` }];
  });
}

function endOf({ low, high }: Parameter, value: number): string {
  if (value === low) return 'low';
  return value === high ? 'high' : '';
}
