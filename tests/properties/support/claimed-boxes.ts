import type { Result } from '../../../shared/contracts';
import type { ClaimedBox } from './attack-box';
import type { ModelParameter, StudyModel } from './study-model';

/** All that a result claims to hold, as boxes: payload ranges, the stretched bands, the bands themselves. */
export function claimedBoxes(model: StudyModel, result: Result): ClaimedBox[] {
  const { parameters, payload } = model;
  const boxes: ClaimedBox[] = [];
  const ends = (claim: string, low: (p: ModelParameter, i: number) => number, high: typeof low): void => {
    boxes.push({ claim, low: Float64Array.from(parameters, low), high: Float64Array.from(parameters, high) });
  };
  const upTo = result.largestPayload?.provedTo;
  if (typeof upTo === 'number') {
    ends(
      'largestPayload',
      (p, i) => (i === payload ? p.nominal : p.low),
      (p, i) => (i === payload ? upTo : p.high),
    );
  }
  const downTo = result.smallestPayload?.provedTo;
  if (typeof downTo === 'number') {
    ends(
      'smallestPayload',
      (p, i) => (i === payload ? downTo : p.low),
      (p, i) => (i === payload ? p.nominal : p.high),
    );
  }
  const stretch = result.bandStretch?.provedTo;
  if (typeof stretch === 'number') boxes.push({ claim: 'bandStretch', ...stretchedBands(model, stretch) });
  if (result.bands.verdict === 'holds') {
    ends(
      'bands',
      (p) => p.low,
      (p) => p.high,
    );
  }
  return boxes;
}

/** Bands of tolerance, wear and payload grown about the nominal, within minimum and maximum. */
export function stretchedBands(model: StudyModel, factor: number): { low: Float64Array; high: Float64Array } {
  const stretches = ({ kind }: ModelParameter, i: number): boolean => kind !== 'use' || i === model.payload;
  return {
    low: Float64Array.from(model.parameters, (p, i) =>
      stretches(p, i) && p.low < p.nominal
        ? Math.max(p.minimum ?? -Infinity, p.nominal - factor * (p.nominal - p.low))
        : p.low,
    ),
    high: Float64Array.from(model.parameters, (p, i) =>
      stretches(p, i) && p.high > p.nominal
        ? Math.min(p.maximum ?? Infinity, p.nominal + factor * (p.high - p.nominal))
        : p.high,
    ),
  };
}
