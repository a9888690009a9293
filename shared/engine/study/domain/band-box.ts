/** A box of parameter values in SI: one closed range for each variable. */
export interface BandBox {
  readonly low: readonly number[];
  readonly high: readonly number[];
}

export function centreOf({ low, high }: BandBox): number[] {
  return low.map((value, i) => value + (high[i] - value) / 2);
}

/**
 * Halves a box along the variable that is widest in proportion to the whole; undefined where it is too small to be
 * split any further.
 */
export function halves(
  box: BandBox,
  whole: BandBox,
  splits: (variable: number) => boolean,
): [BandBox, BandBox] | undefined {
  let widest = -1;
  let largest = 0;
  box.low.forEach((low, i) => {
    const width = (box.high[i] - low) / (whole.high[i] - whole.low[i]);
    if (splits(i) && width > largest) {
      largest = width;
      widest = i;
    }
  });
  if (widest < 0) return undefined;
  const middle = box.low[widest] + (box.high[widest] - box.low[widest]) / 2;
  if (middle <= box.low[widest] || middle >= box.high[widest]) return undefined;
  return [
    { low: box.low, high: box.high.with(widest, middle) },
    { low: box.low.with(widest, middle), high: box.high },
  ];
}

/** Corners of a box along its first few variables, the others at their low and then at their high ends. */
export function cornersOf(box: BandBox, mostVariables: number): number[][] {
  const count = Math.min(box.low.length, mostVariables);
  const corners: number[][] = [];
  for (const rest of count < box.low.length ? [box.low, box.high] : [box.low]) {
    for (let mask = 0; mask < 1 << count; mask++) {
      corners.push(
        rest.map((value, i) => (i < count ? ((mask >> i) & 1 ? box.high[i] : box.low[i]) : value)),
      );
    }
  }
  return corners;
}

/** Halvings of the way between two points: as many as make neighbours of any two doubles of similar size. */
const HALVINGS = 100;

/**
 * A point between two at which a continuous quantity has opposite signs, as near to its zero as doubles lie.
 *
 * @param signAt −1, 0 or 1; undefined where it cannot be told, which ends the search there
 */
export function pointOfSignChange(
  positive: readonly number[],
  negative: readonly number[],
  signAt: (point: readonly number[]) => number | undefined,
): readonly number[] {
  let above = positive;
  let below = negative;
  for (let step = 0; step < HALVINGS; step++) {
    const middle = centreOf({ low: above, high: below });
    const sign = signAt(middle);
    if (sign === undefined || sign === 0) return middle;
    if (sign > 0) above = middle;
    else below = middle;
  }
  return below;
}
