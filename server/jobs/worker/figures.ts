import type { Result, Scalar, Study } from '../../../shared/contracts';
import type { RunFigures } from '../../../shared/contracts/api';
import { type ComposedStudy, inUnit } from '../../../shared/engine';

interface RatedRange {
  readonly unit: string | null;
  readonly ratedLow: number | null;
  readonly ratedHigh: number | null;
}

/** A number stays as it was written; an expression's value comes back from SI. */
function written(scalar: Scalar | undefined, value: () => number): number {
  return typeof scalar === 'number' ? scalar : value();
}

function ratedRange(study: Study, composed: ComposedStudy): RatedRange {
  const { payload } = composed;
  if (payload === undefined) return { unit: null, ratedLow: null, ratedHigh: null };
  const { unit = null, nominal, low = nominal, high = nominal } = study.parameters[payload];
  const parameter = composed.parameters[payload];
  return {
    unit,
    ratedLow: written(low, () => inUnit(parameter, parameter.low)),
    ratedHigh: written(high, () => inUnit(parameter, parameter.high)),
  };
}

/** What lists show of a result. */
export function figuresOf(study: Study, composed: ComposedStudy, result: Result): RunFigures {
  const { bands, largestPayload, smallestPayload, bandStretch, rating, delay } = result;
  return {
    ...ratedRange(study, composed),
    verdict: bands.verdict,
    proof: bands.proof,
    approximated: delay?.approximated === true,
    provedLow: smallestPayload?.provedTo ?? null,
    provedHigh: largestPayload?.provedTo ?? null,
    failsAt: largestPayload?.failsAt ?? null,
    // Where nothing is proved, the failing point is the nominal one: it stands at the heavy end already.
    failsBelow: typeof largestPayload?.provedTo === 'number' ? (smallestPayload?.failsAt ?? null) : null,
    plate: rating?.plate ?? null,
    limiting: largestPayload?.requirement ?? bands.requirement ?? bandStretch?.requirement ?? null,
  };
}
