/** What the payload pictures show; every value in one and the same unit. */
export interface PayloadRanges {
  readonly rated?: { readonly low: number; readonly high: number } | undefined;
  readonly proved?: { readonly low: number; readonly high: number } | undefined;
  /** Where a failing point was found beyond the ends of the proved range. */
  readonly failsBelow?: number | undefined;
  readonly failsAbove?: number | undefined;
  /** Not proved but sampled: drawn with a dotted edge. */
  readonly sampled?: boolean | undefined;
}

/** A stretch of a scale, as shares of its length. */
export interface Stretch {
  readonly from: number;
  readonly to: number;
}

export interface RangeLayout {
  readonly rated: Stretch | undefined;
  readonly proved: Stretch | undefined;
  readonly ratedAndProved: Stretch | undefined;
  readonly below: (Stretch & { readonly fails: boolean }) | undefined;
  readonly above: (Stretch & { readonly fails: boolean }) | undefined;
  /** Load marks: where the proved range ends because something fails. */
  readonly marks: readonly number[];
}

/** Where the parts of a payload picture lie on a scale from 0 to `end`. */
export function layOutRanges(ranges: PayloadRanges, end: number): RangeLayout {
  const share = (value: number): number => Math.min(1, Math.max(0, value / end));
  const { rated, proved, failsBelow, failsAbove } = ranges;
  const stretch = (low: number, high: number): Stretch | undefined =>
    share(high) > share(low) ? { from: share(low), to: share(high) } : undefined;

  const beyond = (part: Stretch | undefined, fails: boolean) =>
    part === undefined ? undefined : { ...part, fails };
  const below = proved === undefined ? undefined : beyond(stretch(0, proved.low), failsBelow !== undefined);
  const above =
    proved === undefined
      ? beyond(stretch(0, end), failsAbove !== undefined)
      : beyond(stretch(proved.high, end), failsAbove !== undefined);
  const marks = [
    ...(failsBelow === undefined ? [] : [share(proved?.low ?? failsBelow)]),
    ...(failsAbove === undefined ? [] : [share(proved?.high ?? failsAbove)]),
  ];
  return {
    rated: rated && stretch(rated.low, rated.high),
    proved: proved && stretch(proved.low, proved.high),
    ratedAndProved:
      rated && proved && stretch(Math.max(rated.low, proved.low), Math.min(rated.high, proved.high)),
    below,
    above,
    marks: marks.filter((mark) => mark < 1),
  };
}
