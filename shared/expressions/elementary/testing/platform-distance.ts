import { binaryValue, errorInUlps } from './fixed-point-oracle';

/** The largest distance, in ulps of `reference`, between two implementations over drawn arguments. */
export function platformDistance(
  computed: (x: number) => number,
  reference: (x: number) => number,
  draw: () => number,
  count: number,
): number {
  let worst = 0;
  for (let i = 0; i < count; i += 1) {
    const argument = draw();
    const expected = reference(argument);
    const found = computed(argument);
    const distance =
      expected === 0 ? (found === 0 ? 0 : Infinity) : errorInUlps(found, binaryValue(expected));
    worst = Math.max(worst, distance);
  }
  return worst;
}
