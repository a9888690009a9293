import { productError, sumError } from '../elementary/double-double';
import { nextDown } from './rounding';

/*
 * Single operations rounded down or up. Where the error term of the rounded result can be formed
 * exactly (Møller 1965, Knuth, Dekker 1971) its sign decides, so that the result is the nearest
 * double on that side and exact results stay as they are; beside overflow and underflow the result
 * moves by one ulp.
 *
 * Infinite operands stand for unbounded ends of intervals: 0·∞ is 0, and a finite sum, product or
 * quotient that overflows is bounded by the greatest double on the inner side.
 */

/** Outside these sizes a product's error term may itself overflow or underflow. */
const LARGEST_SPLIT = 1e290;
const LEAST_PRODUCT = 1e-280;

/** a + b rounded down; −∞ for ∞ − ∞. */
export function addDown(a: number, b: number): number {
  const sum = a + b;
  if (!isFinite(sum)) return belowInfinite(sum, isFinite(a) && isFinite(b));
  return sumError(a, b, sum) >= 0 ? sum : nextDown(sum);
}

/** a + b rounded up; ∞ for ∞ − ∞. */
export function addUp(a: number, b: number): number {
  return 0 - addDown(-a, -b);
}

/** a·b rounded down. */
export function multiplyDown(a: number, b: number): number {
  if (a === 0 || b === 0) return 0;
  const product = a * b;
  if (!isFinite(product)) return belowInfinite(product, isFinite(a) && isFinite(b));
  if (isSplittable(a, b, product) && productError(a, b, product) >= 0) return product;
  return nextDown(product);
}

/** a·b rounded up. */
export function multiplyUp(a: number, b: number): number {
  return 0 - multiplyDown(-a, b);
}

/** a/b rounded down, b not 0; ±∞/±∞ gives 0, which its neighbours in an interval quotient cover. */
export function divideDown(a: number, b: number): number {
  if (a === 0 || (!isFinite(a) && !isFinite(b))) return 0;
  if (!isFinite(b)) return 0;
  const quotient = a / b;
  if (!isFinite(quotient)) return belowInfinite(quotient, isFinite(a));
  const product = quotient * b;
  if (isSplittable(quotient, b, product)) {
    const remainder = a - product - productError(quotient, b, product);
    if (remainder === 0 || remainder > 0 === b > 0) return quotient;
  }
  return nextDown(quotient);
}

/** a/b rounded up, b not 0. */
export function divideUp(a: number, b: number): number {
  return 0 - divideDown(-a, b);
}

/** √a rounded down, a >= 0. */
export function sqrtDown(a: number): number {
  const root = Math.sqrt(a);
  if (root === 0 || root === Infinity) return root;
  return rootRemainder(a, root) >= 0 ? root : nextDown(root);
}

/** √a rounded up, a >= 0. */
export function sqrtUp(a: number): number {
  const root = Math.sqrt(a);
  if (root === 0 || root === Infinity) return root;
  return rootRemainder(a, root) <= 0 ? root : -nextDown(-root);
}

/** a − root²; NaN where it cannot be formed exactly. */
function rootRemainder(a: number, root: number): number {
  const square = root * root;
  return isSplittable(root, root, square) ? a - square - productError(root, root, square) : NaN;
}

function belowInfinite(result: number, finiteOperands: boolean): number {
  if (result === Infinity) return finiteOperands ? Number.MAX_VALUE : Infinity;
  return -Infinity;
}

function isSplittable(a: number, b: number, product: number): boolean {
  const size = Math.abs(product);
  return (
    Math.abs(a) < LARGEST_SPLIT && Math.abs(b) < LARGEST_SPLIT && size < LARGEST_SPLIT && size > LEAST_PRODUCT
  );
}

function isFinite(x: number): boolean {
  return x - x === 0;
}
