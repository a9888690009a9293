import { describe, expect, it } from 'vitest';
import { Fraction, ONE } from '../../expressions/testing/fraction';
import { BernsteinKernel, type TensorShape } from './bernstein-kernel';
import { bernsteinValueAt } from './testing/bernstein-value';
import { seededRandom } from './testing/random';

const SHAPES: TensorShape[] = [
  { degrees: [], degree: 5, sheets: 1, discRadius: undefined },
  { degrees: [2], degree: 4, sheets: 1, discRadius: undefined },
  { degrees: [1, 3], degree: 3, sheets: 1, discRadius: undefined },
  { degrees: [2, 0, 1], degree: 2, sheets: 1, discRadius: undefined },
  { degrees: [2], degree: 3, sheets: 2, discRadius: undefined },
  { degrees: [1, 2], degree: 3, sheets: 1, discRadius: 0.5 },
];

/** Integer coefficients: every value at a dyadic point is exact in doubles. */
function integerBox(
  kernel: BernsteinKernel,
  random: () => number,
  centre: number,
  spread: number,
): Float64Array {
  const box = new Float64Array(kernel.length);
  for (let i = 0; i < kernel.radiusOffset(0); i++) box[i] = Math.floor(centre + spread * (2 * random() - 1));
  return box;
}

/** A point of the unit cube with few binary digits. */
function dyadicPoint(kernel: BernsteinKernel, random: () => number): number[] {
  return Array.from({ length: kernel.shape.degrees.length + 1 }, () => Math.floor(9 * random()) / 8);
}

function fractions(point: readonly number[]): Fraction[] {
  return point.map((value) => Fraction.of(value));
}

/** Shifts one polynomial of a box by a constant, so that its value on the first sheet at the point becomes `target`. */
function shiftTo(
  kernel: BernsteinKernel,
  box: Float64Array,
  point: readonly number[],
  target: { readonly re: number; readonly im: number },
): void {
  const { value } = bernsteinValueAt(kernel, box, fractions(point));
  const re = target.re - value.re.toNumber();
  const im = target.im - value.im.toNumber();
  for (let i = 0; i < kernel.size; i++) {
    box[i] += re;
    box[kernel.size + i] += im;
  }
}

/** Splits towards the point a number of times, along all dimensions in turn; calls `visit` with each child that holds it. */
function descend(
  kernel: BernsteinKernel,
  start: Float64Array,
  point: readonly number[],
  depth: number,
  visit: (box: Float64Array, place: number[]) => void,
): void {
  let box = start;
  const place = [...point];
  for (let step = 0; step < depth; step++) {
    const dimension = step % place.length;
    const right = new Float64Array(kernel.length);
    kernel.split(box, right, dimension);
    place[dimension] *= 2;
    if (place[dimension] > 1) {
      place[dimension] -= 1;
      box = right;
    }
    visit(box, place);
  }
}

/** What the test would say if nothing had been rounded. */
function withoutRadii(kernel: BernsteinKernel, box: Float64Array): Float64Array {
  return box.slice().fill(0, kernel.radiusOffset(0));
}

/**
 * Whether for some Δ of the disc no direction excludes 0 from all a + Δd: such a box may not be excluded however the
 * disc is cut. Without a disc there is Δ = 0 only.
 */
function isHitByOneOf(
  kernel: BernsteinKernel,
  box: Float64Array,
  bestOf: (value: (direction: number) => number) => number,
): boolean {
  const { size } = kernel;
  const beta = kernel.shape.discRadius;
  const around = beta === undefined ? [] : [0, 1, 2, 3, 4, 5, 6, 7].map((part) => (Math.PI * part) / 4);
  const places = [{ re: 0, im: 0 }, ...around.map((at) => ({ re: Math.cos(at), im: Math.sin(at) }))];
  return places.some(({ re, im }) => {
    const least = (direction: number): number => {
      let value = Infinity;
      for (let i = 0; i < size; i++) {
        const dx = beta === undefined ? 0 : beta * box[2 * size + i];
        const dy = beta === undefined ? 0 : beta * box[3 * size + i];
        const x = box[i] + re * dx - im * dy;
        const y = box[size + i] + re * dy + im * dx;
        value = Math.min(value, x * Math.cos(direction) + y * Math.sin(direction));
      }
      return value;
    };
    return bestOf(least) < -0.01;
  });
}

describe('exclusion', () => {
  it.each(SHAPES)('never excludes a box with a contact, nor a part that holds it: %j', (shape) => {
    const kernel = new BernsteinKernel(shape);
    const random = seededRandom(11);
    let clearBoxes = 0;
    for (let trial = 0; trial < 80; trial++) {
      const box = integerBox(kernel, random, trial % 3 === 0 ? 0 : 40, 40);
      const point = dyadicPoint(kernel, random);
      let target = { re: 0, im: 0 };
      if (shape.discRadius !== undefined) {
        // abs(a) = β abs(d) exactly, at a right angle.
        const { value } = bernsteinValueAt(kernel, box, fractions(point), 1);
        target = { re: -shape.discRadius * value.im.toNumber(), im: shape.discRadius * value.re.toNumber() };
      }
      if (kernel.excludes(box)) clearBoxes++;
      shiftTo(kernel, box, point, target);
      expect(kernel.excludes(box)).toBe(false);
      expect(kernel.excludes(withoutRadii(kernel, box))).toBe(false);
      descend(kernel, box, point, 24, (part) => {
        expect(kernel.excludes(part)).toBe(false);
      });
    }
    // Without the shift some of these boxes are excluded: the test above is not empty.
    expect(clearBoxes).toBeGreaterThan(0);
  });

  it.each(SHAPES)('finds a direction whenever there is one: %j', (shape) => {
    const kernel = new BernsteinKernel(shape);
    const random = seededRandom(12);
    const { size } = kernel;
    const outcomes = { excluded: 0, kept: 0 };
    for (let trial = 0; trial < 400; trial++) {
      const box = new Float64Array(kernel.length);
      // Coefficients around a random direction, in a sector that is sometimes just below and sometimes above a half turn.
      const middle = 2 * Math.PI * random();
      const halfWidth = Math.PI * (0.2 + 0.6 * random());
      for (let i = 0; i < size; i++) {
        const angle = middle + halfWidth * (2 * random() - 1);
        const length = 0.1 + random() * 3;
        box[i] = length * Math.cos(angle);
        box[size + i] = length * Math.sin(angle);
        if (kernel.polynomials === 2) {
          box[2 * size + i] = 0.4 * (random() - 0.5);
          box[3 * size + i] = 0.4 * (random() - 0.5);
        }
      }
      const distance = (direction: number): number => {
        let least = Infinity;
        for (let i = 0; i < size; i++) {
          const reach = box[i] * Math.cos(direction) + box[size + i] * Math.sin(direction);
          const disc =
            kernel.polynomials === 2
              ? (shape.discRadius ?? 0) * Math.hypot(box[2 * size + i], box[3 * size + i])
              : 0;
          least = Math.min(least, reach - disc);
        }
        return least;
      };
      const bestOf = (value: (direction: number) => number): number => {
        let best = -Infinity;
        for (let step = 0; step < 3600; step++) best = Math.max(best, value((Math.PI * step) / 1800));
        return best;
      };
      const best = bestOf(distance);
      if (best > 1e-9) {
        expect(kernel.excludes(box)).toBe(true);
        outcomes.excluded++;
      } else if (best < -0.01 && isHitByOneOf(kernel, box, bestOf)) {
        expect(kernel.excludes(box)).toBe(false);
        outcomes.kept++;
      }
    }
    expect(outcomes.excluded).toBeGreaterThan(40);
    expect(outcomes.kept).toBeGreaterThan(40);
  });

  it('needs more than the error radius of each column', () => {
    const kernel = new BernsteinKernel({ degrees: [1], degree: 1, sheets: 1, discRadius: undefined });
    // All coefficients 1, but 1e−3 in the column t = 0.
    const box = Float64Array.of(1e-3, 1, 1e-3, 1, 0, 0, 0, 0, 0.99e-3, 0.99);
    expect(kernel.excludes(box)).toBe(true);
    box[kernel.radiusOffset(0)] = 1.01e-3;
    expect(kernel.excludes(box)).toBe(false);
    expect(kernel.excludes(withoutRadii(kernel, box))).toBe(true);
    box[kernel.radiusOffset(0)] = 0;
    box[kernel.radiusOffset(0) + 1] = 1.01;
    expect(kernel.excludes(box)).toBe(false);
  });

  it('counts the error radii of both polynomials of a disc', () => {
    const kernel = new BernsteinKernel({ degrees: [], degree: 0, sheets: 1, discRadius: 0.5 });
    const box = (first: number, second: number, radius: number, otherRadius: number): Float64Array =>
      Float64Array.of(first, 0, 0, second, radius, otherRadius);
    expect(kernel.excludes(box(1, 1.99, 0, 0))).toBe(true);
    expect(kernel.excludes(box(1, 2.01, 0, 0))).toBe(false);
    expect(kernel.excludes(box(1, 1, 0.49, 0))).toBe(true);
    expect(kernel.excludes(box(1, 1, 0.51, 0))).toBe(false);
    expect(kernel.excludes(box(1, 1, 0, 0.99))).toBe(true);
    expect(kernel.excludes(box(1, 1, 0, 1.01))).toBe(false);
  });

  it('is not deceived by squares that fall below the smallest double', () => {
    const kernel = new BernsteinKernel({ degrees: [], degree: 1, sheets: 1, discRadius: 0.9 });
    const box = (a: number, dRe: number, dIm: number): Float64Array =>
      Float64Array.of(1, a, 0, 0, 0, dRe, 0, dIm, 0, 0, 0, 0);
    // 0.9 abs(d) is 1.98e−162, but the squares of d's parts round to 0 and that of a does not.
    expect(kernel.excludes(box(1.58e-162, 1.56e-162, 1.56e-162))).toBe(false);
    expect(kernel.excludes(box(1e-171, 1e-170, 0))).toBe(false);
    expect(kernel.excludes(box(1e-121, 1e-120, 0))).toBe(false);
    expect(kernel.excludes(box(1e-120, 1e-121, 0))).toBe(true);
  });

  it('proves nothing from zeros and numbers that are not finite', () => {
    for (const shape of SHAPES) {
      const kernel = new BernsteinKernel(shape);
      expect(kernel.excludes(new Float64Array(kernel.length))).toBe(false);
      expect(kernel.excludes(new Float64Array(kernel.length).fill(NaN))).toBe(false);
      const box = new Float64Array(kernel.length);
      box.fill(1, 0, kernel.size);
      expect(kernel.excludes(box)).toBe(true);
      for (const value of [NaN, -Infinity]) {
        const spoiled = box.slice();
        spoiled[kernel.size - 1] = value;
        expect(kernel.excludes(spoiled)).toBe(false);
      }
    }
  });
});

describe('splitting', () => {
  it.each(SHAPES)('is a change of parameter, with the radius a bound of the error: %j', (shape) => {
    const kernel = new BernsteinKernel(shape);
    const random = seededRandom(13);
    let worst = 0;
    for (let trial = 0; trial < 6; trial++) {
      const box = new Float64Array(kernel.length);
      for (let i = 0; i < kernel.radiusOffset(0); i++) {
        // Columns of very different size, as stiff loops have them.
        const column = i % kernel.columns;
        box[i] = (random() - 0.5) * 10 ** (trial % 2 === 0 ? 0 : -4 * column);
      }
      const original = box.slice();
      let part = box;
      const corner = kernel.shape.degrees.map(() => new Fraction(0n)).concat(new Fraction(0n));
      const width = corner.map(() => ONE);
      for (let step = 0; step < 10; step++) {
        const dimension = Math.floor(random() * corner.length);
        const right = new Float64Array(kernel.length);
        kernel.split(part, right, dimension);
        width[dimension] = width[dimension].multiply(new Fraction(1n, 2n));
        if (random() < 0.5) {
          part = right;
          corner[dimension] = corner[dimension].add(width[dimension]);
        }
        const inside = corner.map(() => Fraction.of(random()));
        const outside = inside.map((value, i) => corner[i].add(width[i].multiply(value)));
        for (let polynomial = 0; polynomial < kernel.polynomials; polynomial++) {
          for (let sheet = 0; sheet < shape.sheets; sheet++) {
            const { value, radius } = bernsteinValueAt(kernel, part, inside, polynomial, sheet);
            const exact = bernsteinValueAt(kernel, original, outside, polynomial, sheet).value;
            const error = value.subtract(exact).squaredModulus;
            expect(error.compare(radius.multiply(radius))).toBeLessThanOrEqual(0);
            const bound = radius.toNumber();
            if (bound > 0) worst = Math.max(worst, Math.sqrt(error.toNumber()) / bound);
          }
        }
      }
    }
    // The bound is not far from what is lost.
    expect(worst).toBeGreaterThan(0.005);
    expect(worst).toBeLessThanOrEqual(1);
  });

  it('leaves no rounding, and so no radius too small, where the coefficients have few digits', () => {
    const kernel = new BernsteinKernel(SHAPES[2]);
    const box = integerBox(kernel, seededRandom(14), 0, 100);
    const right = new Float64Array(kernel.length);
    const original = box.slice();
    kernel.split(box, right, 1);
    const at = [new Fraction(1n, 3n), new Fraction(1n, 5n), new Fraction(2n, 7n)];
    const half = new Fraction(1n, 2n);
    const left = [at[0], at[1].multiply(half), at[2]];
    const shifted = [at[0], at[1].multiply(half).add(half), at[2]];
    const difference = (part: Float64Array, place: Fraction[]): boolean =>
      bernsteinValueAt(kernel, part, at).value.subtract(bernsteinValueAt(kernel, original, place).value)
        .isZero;
    expect(difference(box, left)).toBe(true);
    expect(difference(right, shifted)).toBe(true);
  });

  it('carries given radii into both halves', () => {
    const kernel = new BernsteinKernel({ degrees: [1], degree: 2, sheets: 1, discRadius: undefined });
    const box = new Float64Array(kernel.length);
    box.fill(1, 0, kernel.size);
    const radii = kernel.radiusOffset(0);
    box.set([0.5, 0.25, 0.125], radii);
    const right = new Float64Array(kernel.length);
    kernel.split(box, right, 1);
    const near = (part: Float64Array, expected: number[]): void => {
      expected.forEach((value, k) => {
        expect(part[radii + k]).toBeGreaterThanOrEqual(value);
        expect(part[radii + k]).toBeLessThan(value + 1e-14);
      });
    };
    near(box, [0.5, 0.375, 0.28125]);
    near(right, [0.28125, 0.1875, 0.125]);
  });
});

describe('the dimension to split', () => {
  /** A polynomial that varies along one dimension only. */
  function varying(kernel: BernsteinKernel, dimension: number): Float64Array {
    const box = new Float64Array(kernel.length);
    const degrees = [...kernel.shape.degrees, kernel.shape.degree];
    for (let i = 0; i < kernel.size; i++) {
      let rest = i;
      let index = 0;
      for (let d = degrees.length - 1; d >= 0; d--) {
        const digit = rest % (degrees[d] + 1);
        rest = (rest - digit) / (degrees[d] + 1);
        if (d === dimension) index = digit;
      }
      box[i] = 1 + index;
      box[kernel.size + i] = index * index;
    }
    return box;
  }

  it.each([0, 1, 2])('is the one along which the coefficients turn: %i', (dimension) => {
    const kernel = new BernsteinKernel(SHAPES[2]);
    expect(kernel.splitDimension(varying(kernel, dimension), Uint8Array.of(1, 1, 1))).toBe(dimension);
  });

  it('is one that may be split', () => {
    const kernel = new BernsteinKernel(SHAPES[2]);
    const box = varying(kernel, 1);
    expect(kernel.splitDimension(box, Uint8Array.of(0, 0, 1))).toBe(2);
    expect(kernel.splitDimension(box, Uint8Array.of(1, 0, 0))).toBe(0);
    expect(kernel.splitDimension(box, Uint8Array.of(0, 0, 0))).toBe(-1);
    const flat = new BernsteinKernel(SHAPES[3]);
    expect(flat.splitDimension(new Float64Array(flat.length), Uint8Array.of(0, 1, 0))).toBe(-1);
    expect([0, 1, 2, 3].map((i) => flat.degreeAlong(i))).toEqual([2, 0, 1, 2]);
  });
});

describe('noise', () => {
  it('is a box that is nowhere larger than its radii', () => {
    const kernel = new BernsteinKernel(SHAPES[1]);
    const box = new Float64Array(kernel.length);
    box.fill(1e-12, 0, kernel.radiusOffset(0));
    box.fill(1e-12, kernel.radiusOffset(0));
    expect(kernel.isNoise(box)).toBe(true);
    box[7] = 1e-10;
    expect(kernel.isNoise(box)).toBe(false);
  });
});
