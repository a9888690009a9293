import { add, multiply, negate, type Interval } from '../../../expressions/interval';

/** What is known of a value that may not exist, or is too costly to enclose. */
export const ANY: Interval = { low: -Infinity, high: Infinity };

/** Largest matrix whose minors are enclosed: 2^size sets of columns. */
const LARGEST_SIZE = 12;

const NOTHING: Interval = { low: 0, high: 0 };

/** Encloses the determinant of a matrix of intervals, by minors of its first rows; ANY for a large one. */
export function intervalDeterminant(rows: readonly (readonly Interval[])[]): Interval {
  const size = rows.length;
  if (size > LARGEST_SIZE) return ANY;
  let minors = new Map<number, Interval>([[0, { low: 1, high: 1 }]]);
  for (const row of rows) {
    const next = new Map<number, Interval>();
    for (const [mask, minor] of minors) {
      let negative = false;
      // Each used column to the right of the new one is a transposition.
      for (let column = size - 1; column >= 0; column--) {
        if (((mask >> column) & 1) === 1) {
          negative = !negative;
          continue;
        }
        const entry = row[column];
        if (entry.low === 0 && entry.high === 0) continue;
        const product = multiply(minor, negative ? negate(entry) : entry);
        const union = mask | (1 << column);
        const known = next.get(union);
        next.set(union, known === undefined ? product : add(known, product));
      }
    }
    minors = next;
  }
  return minors.get((1 << size) - 1) ?? NOTHING;
}
