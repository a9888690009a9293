import { productError } from './double-double';

/**
 * √(1 − x²) for 2^−480 <= x < 1 as a pair out[0] + out[1] good to about 100 bits. 1 − x² is formed
 * from the exact square, so nothing is lost by cancellation near 1.
 */
export function circleComplement(x: number, out: Float64Array): void {
  const square = x * x;
  const difference = 1 - square;
  const low = 1 - difference - square - productError(x, x, square);
  const radicand = difference + low;
  const radicandLow = low - (radicand - difference);
  const root = Math.sqrt(radicand);
  const rootSquare = root * root;
  out[0] = root;
  out[1] = (radicand - rootSquare - productError(root, root, rootSquare) + radicandLow) / (2 * root);
}
