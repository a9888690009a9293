import type { ParameterFacts } from '../store/parameter-facts';

export interface Range {
  readonly low: number;
  readonly high: number;
}

/** The share of a band, or of an exact nominal value, by which a range goes beyond. */
const WIDENING = 0.5;
const STEPS = 8;
const ROUND_STEPS = [1, 2, 2.5, 5, 10];

/**
 * What an axis or a lane shows of a parameter: its band and half of it on each side, to round ends, within the
 * physical ones. Undefined where the numbers are not plain.
 *
 * @param alsoAt a value that is to be seen as well, such as where the payload fails, unless that is far away
 */
export function axisRange(facts: ParameterFacts, alsoAt?: number): Range | undefined {
  const { nominal, minimum = -Infinity, maximum = Infinity } = facts;
  const { low = nominal, high = nominal } = facts;
  if (nominal === undefined || low === undefined || high === undefined) return undefined;
  const margin = WIDENING * (high > low ? high - low : Math.abs(nominal) || 1);
  const reach = alsoAt !== undefined && alsoAt <= 3 * high ? Math.max(high, alsoAt) : high;
  const step = roundStep((reach - low + 2 * margin) / STEPS);
  const from = Math.max(minimum, roundTo(Math.floor((low - margin) / step), step));
  const to = Math.min(maximum, roundTo(Math.ceil((reach + margin) / step), step));
  return from < to ? { low: from, high: to } : undefined;
}

/** Whether a range still shows the band, with some room beyond its ends where it may be dragged to. */
export function stillShows({ low, high }: Range, facts: ParameterFacts): boolean {
  const { nominal } = facts;
  const { low: bandLow = nominal, high: bandHigh = nominal } = facts;
  return (
    nominal !== undefined &&
    bandLow !== undefined &&
    bandHigh !== undefined &&
    low <= bandLow &&
    bandHigh <= high &&
    // A band that has become tiny could no longer be taken hold of.
    (bandHigh === bandLow || bandHigh - bandLow > (high - low) / 100)
  );
}

function roundStep(wanted: number): number {
  const power = 10 ** Math.floor(Math.log10(wanted));
  return (ROUND_STEPS.find((candidate) => candidate * power >= wanted) ?? 10) * power;
}

function roundTo(steps: number, step: number): number {
  return Number((steps * step).toPrecision(12));
}
