import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { BernsteinKernel } from './bernstein-kernel';

const EIGHTHS = [1, 2, 3, 4, 5, 6, 7].map((part) => part / 8);

/** A box without variables: the coefficients of both sheets along t, no radii. */
function boxOf(
  kernel: BernsteinKernel,
  first: readonly [number, number][],
  second: readonly [number, number][],
) {
  const box = new Float64Array(kernel.length);
  [...first, ...second].forEach(([re, im], i) => {
    box[i] = re;
    box[kernel.size + i] = im;
  });
  return box;
}

function turned([re, im]: readonly [number, number], degrees: number): [number, number] {
  const angle = (degrees * Math.PI) / 180;
  return [re * Math.cos(angle) - im * Math.sin(angle), re * Math.sin(angle) + im * Math.cos(angle)];
}

describe('exclusion between two sheets', () => {
  it('gives each piece of the way a direction of its own', () => {
    const shape = { degrees: [], degree: 2, sheets: 2, discRadius: undefined };
    const whole = new BernsteinKernel(shape);
    const cut = new BernsteinKernel({ ...shape, cuts: EIGHTHS });
    // Three coefficients 60° apart, each on its way from 1 + 5j to 1 − 5j: together they look into all directions.
    const first = [-60, 0, 60].map((degrees) => turned([1, 5], degrees));
    const second = [-60, 0, 60].map((degrees) => turned([1, -5], degrees));
    expect(whole.excludes(boxOf(whole, first, second))).toBe(false);
    expect(cut.excludes(boxOf(cut, first, second))).toBe(true);
  });

  it('respects the error radii on every piece', () => {
    const kernel = new BernsteinKernel({
      degrees: [],
      degree: 1,
      sheets: 2,
      discRadius: undefined,
      cuts: EIGHTHS,
    });
    const line = [1, 5] as [number, number];
    const mirrored = [1, -5] as [number, number];
    const box = boxOf(kernel, [line, line], [mirrored, mirrored]);
    box.fill(0.99, kernel.radiusOffset(0));
    expect(kernel.excludes(box)).toBe(true);
    // Halfway the coefficients are 1: a radius of 1.01 reaches 0.
    box.fill(1.01, kernel.radiusOffset(0));
    expect(kernel.excludes(box)).toBe(false);
  });

  it('never excludes a box with a zero somewhere between the sheets', () => {
    const value = fc.integer({ min: -20, max: 20 });
    const sheet = fc.array(fc.tuple(value, value), { minLength: 3, maxLength: 3 });
    const share = fc.integer({ min: 0, max: 16 }).map((part) => part / 16);
    const shape = { degrees: [], degree: 2, sheets: 2, discRadius: undefined, cuts: EIGHTHS };
    const kernel = new BernsteinKernel(shape);
    fc.assert(
      fc.property(sheet, sheet, share, share, (first, second, t, place) => {
        const weights = [(1 - t) * (1 - t), 2 * t * (1 - t), t * t];
        const at = (part: 0 | 1) =>
          weights.reduce(
            (sum, weight, k) => sum + weight * ((1 - place) * first[k][part] + place * second[k][part]),
            0,
          );
        // Moved so that the value at (t, place) is exactly 0: all figures are small dyadic numbers.
        const [re, im] = [at(0), at(1)];
        const moved = (points: readonly [number, number][]) =>
          points.map(([x, y]): [number, number] => [x - re, y - im]);
        expect(kernel.excludes(boxOf(kernel, moved(first), moved(second)))).toBe(false);
      }),
    );
  });
});

describe('exclusion of a disc in sectors', () => {
  const shape = { degrees: [], degree: 2, sheets: 1, discRadius: 0.5 };

  /** Coefficients of a and d along t. */
  function pairOf(kernel: BernsteinKernel, a: readonly [number, number][], d: readonly [number, number][]) {
    const box = new Float64Array(kernel.length);
    a.forEach(([re, im], i) => {
      box[i] = re;
      box[kernel.size + i] = im;
    });
    d.forEach(([re, im], i) => {
      box[2 * kernel.size + i] = re;
      box[3 * kernel.size + i] = im;
    });
    return box;
  }

  it('succeeds where no one direction does for the whole disc', () => {
    const kernel = new BernsteinKernel(shape);
    // All a + Δd with abs(Δ) ≤ ½ stay off 0 for one and the same reason, but the discs around the a look all ways.
    const a = [0, 50, 100].map((degrees) => turned([1, 0], degrees));
    const d = [0, 50, 100].map((degrees) => turned([1.7, 0], degrees));
    expect(kernel.excludes(pairOf(kernel, a, d))).toBe(true);
    const off = [0, 50, 200].map((degrees) => turned([1, 0], degrees));
    expect(kernel.excludes(pairOf(kernel, off, d))).toBe(false);
  });

  it('never excludes a box in which a touches its disc', () => {
    const kernel = new BernsteinKernel(shape);
    const value = fc.integer({ min: -20, max: 20 });
    const curve = fc.array(fc.tuple(value, value), { minLength: 3, maxLength: 3 });
    const share = fc.integer({ min: 0, max: 16 }).map((part) => part / 16);
    const quarter = fc.constantFrom<[number, number]>([0.5, 0], [0, 0.5], [-0.5, 0], [0, -0.5]);
    fc.assert(
      fc.property(curve, curve, share, quarter, (a, d, t, [re, im]) => {
        const weights = [(1 - t) * (1 - t), 2 * t * (1 - t), t * t];
        const at = (points: readonly [number, number][], part: 0 | 1) =>
          weights.reduce((sum, weight, k) => sum + weight * points[k][part], 0);
        // a(t) = −Δ d(t) exactly, with abs(Δ) = β.
        const [dx, dy] = [at(d, 0), at(d, 1)];
        const shift: [number, number] = [-(re * dx - im * dy) - at(a, 0), -(re * dy + im * dx) - at(a, 1)];
        const moved = a.map(([x, y]): [number, number] => [x + shift[0], y + shift[1]]);
        expect(kernel.excludes(pairOf(kernel, moved, d))).toBe(false);
      }),
    );
  });
});
