import { describe, expect, it } from 'vitest';
import type { Measure } from '../../contracts';
import { ExactEvaluator } from '../../expressions';
import { Fraction, ONE, ZERO } from '../../expressions/testing/fraction';
import { BoundaryPolynomials, type Range } from './bernstein-form';
import { boundaryForm } from './boundary-form';
import { degreeOf } from './exact-point';
import { expandLoop, type ExactTerm, type LoopPolynomial } from './loop-polynomial';
import { bernsteinValueAt } from './testing/bernstein-value';
import { ComplexFraction, complexPolynomialAt } from './testing/complex-fraction';
import { matrixLoop, type WrittenEntry } from './testing/matrix-loop';
import { seededRandom } from './testing/random';

const random = seededRandom(61);

/** (t, 1 − t) weighted: Σ_k c_k ω_s^k t^k (1 − t)^(n − k), what the chart makes of Σ c_k ω^k. */
function onChart(coefficients: readonly ComplexFraction[], scale: Fraction, t: Fraction): ComplexFraction {
  const rest = ONE.subtract(t);
  const degree = coefficients.length - 1;
  // Homogeneous form: constant factors (1 − t)^(n − k) are put into the coefficients.
  const weighted = coefficients.map((value, k) => value.scale(rest.power(degree - k)));
  return complexPolynomialAt(weighted, new ComplexFraction(scale.multiply(t)));
}

function keyOf({ power, exponents }: ExactTerm): string {
  return [power, ...exponents].join(' ');
}

function randomPolynomial(variables: number, degree: number): LoopPolynomial {
  const terms = (count: number, top: number): ExactTerm[] => {
    const byKey = new Map<string, ExactTerm>();
    for (let i = 0; i < count; i++) {
      const term = {
        power: Math.floor(random() * (top + 1)),
        exponents: Array.from({ length: variables }, () => Math.floor(random() * 3)),
        coefficient: BigInt(Math.floor((random() - 0.5) * 2 ** 50)) << BigInt(Math.floor(random() * 40)),
      };
      byKey.set(keyOf(term), term);
    }
    return [...byKey.values()];
  };
  const broken = terms(8, degree).concat({
    power: degree,
    exponents: new Array<number>(variables).fill(2),
    coefficient: 12345n,
  });
  return {
    variables,
    exponent: -30,
    broken: [...new Map(broken.map((t) => [keyOf(t), t])).values()],
    returned: terms(5, degree - 1),
    divisors: [],
  };
}

/** The coefficients in ω of each sheet at a point, exact. */
function sheetsAt(
  boundary: BoundaryPolynomials,
  polynomial: LoopPolynomial,
  point: readonly Fraction[],
): ComplexFraction[][] {
  const degree = boundary.form.degree;
  // Sheets are linear in (d, n): they are summed over the power products of the variables.
  const sums = new Map<number, ComplexFraction[]>();
  const add = (terms: readonly ExactTerm[], returned: boolean): void => {
    for (const { power, exponents, coefficient } of terms) {
      const unit = new Array<bigint>(degree + 1).fill(0n);
      unit[power] = coefficient;
      const none = unit.map(() => 0n);
      const weight = exponents.reduce((value, exponent, i) => value.multiply(point[i].power(exponent)), ONE);
      boundary.form.sheetsAt(returned ? none : unit, returned ? unit : none).forEach(({ re, im }, sheet) => {
        const sum = sums.get(sheet) ?? re.map(() => new ComplexFraction(ZERO));
        sums.set(
          sheet,
          sum.map((value, k) =>
            value.add(new ComplexFraction(new Fraction(re[k]), new Fraction(im[k])).scale(weight)),
          ),
        );
      });
    }
  };
  add(polynomial.broken, false);
  add(polynomial.returned, true);
  return [...sums.values()];
}

/** The power of two nearest to a/b. */
function scaleBetween(a: Fraction, b: Fraction): Fraction {
  const exponent = Math.round(Math.log2(a.divide(b).toNumber()) / 2);
  return Fraction.ofDyadic({ mantissa: 1n, exponent });
}

describe('Bernstein form on a box', () => {
  it.each<[Measure, number]>([
    ['stability', 0],
    ['decayRate', 0.3],
    ['dampingRatio', 0.4],
    ['gainMargin', 2],
    ['phaseMargin', 0.6],
    ['modulusMargin', 0.5],
  ])('of %s is the polynomial on the chart, within its radii', (measure, limit) => {
    for (let trial = 0; trial < 4; trial++) {
      const variables = trial % 3;
      const polynomial = randomPolynomial(variables, 4);
      const ranges: Range[] = Array.from({ length: variables }, (_, i) => {
        const low = i === 0 ? 3 + 100 * random() : -2 * random();
        return { low, high: low + 3 * random() };
      });
      const boundary = new BoundaryPolynomials(
        boundaryForm(measure, limit, degreeOf(polynomial)),
        polynomial,
        ranges.map(({ low }) => low),
        ranges.map(({ low, high }) => Math.max(Math.abs(low), Math.abs(high))),
      );
      const { kernel } = boundary;
      const box = new Float64Array(kernel.length);
      boundary.load(box, ranges);
      const omega = Fraction.of(boundary.frequencyScale);
      let factor: Fraction | undefined;
      for (let sample = 0; sample < 5; sample++) {
        const inside = [...ranges, 0].map(() => Fraction.of(random()));
        const point = ranges.map(({ low, high }, i) => {
          const width = Fraction.of(high).subtract(Fraction.of(low));
          return Fraction.of(low).add(width.multiply(inside[i]));
        });
        sheetsAt(boundary, polynomial, point).forEach((coefficients, index) => {
          const exact = onChart(coefficients, omega, inside[variables]);
          const { value, radius } =
            kernel.polynomials === 2
              ? bernsteinValueAt(kernel, box, inside, index)
              : bernsteinValueAt(kernel, box, inside, 0, index);
          factor ??= scaleBetween(value.squaredModulus, exact.squaredModulus);
          const error = value.subtract(exact.scale(factor)).squaredModulus;
          expect(error.compare(radius.multiply(radius))).toBeLessThanOrEqual(0);
          // Neither is the radius anywhere near the values themselves.
          expect(radius.toNumber()).toBeLessThan(1e-12);
        });
      }
    }
  });

  it('is scaled so that its largest power coefficient is near 1, however large the numbers', () => {
    const polynomial: LoopPolynomial = {
      variables: 1,
      exponent: 0,
      broken: [
        { power: 0, exponents: [0], coefficient: 1n << 3000n },
        { power: 2, exponents: [1], coefficient: 1n },
      ],
      returned: [],
      divisors: [],
    };
    const boundary = new BoundaryPolynomials(boundaryForm('stability', 0, 2), polynomial, [1], [2]);
    // The poles are near ±j 2^1500: the chart is held at the largest scale that a double can carry.
    const box = new Float64Array(boundary.kernel.length);
    boundary.load(box, [{ low: 1, high: 2 }]);
    expect(box.every(Number.isFinite)).toBe(true);
    expect(boundary.frequencyScale).toBe(2 ** 1000);
    const ordinary = new BoundaryPolynomials(
      boundaryForm('stability', 0, 2),
      { ...polynomial, broken: [{ power: 0, exponents: [0], coefficient: 1n << 20n }, polynomial.broken[1]] },
      [1],
      [2],
    );
    expect(ordinary.frequencyScale).toBe(1024);
  });
});

/**
 * Halves a box until every part is excluded, is noise or is narrower than `finest` in the first variable; the parts
 * that stay open, as ranges of that variable.
 */
function openParts(boundary: BoundaryPolynomials, range: Range, finest: number): Range[] {
  const { kernel } = boundary;
  const root = new Float64Array(kernel.length);
  boundary.load(root, [range]);
  const stack = [{ box: root, range }];
  const open: Range[] = [];
  let boxes = 0;
  for (let entry = stack.pop(); entry !== undefined; entry = stack.pop()) {
    if (kernel.excludes(entry.box)) continue;
    if (kernel.isNoise(entry.box) || entry.range.high - entry.range.low < finest) {
      open.push(entry.range);
      continue;
    }
    if (++boxes > 50_000) throw new Error('too many boxes');
    const dimension = kernel.splitDimension(entry.box, Uint8Array.of(1, 1));
    const right = new Float64Array(kernel.length);
    kernel.split(entry.box, right, dimension);
    const { low, high } = entry.range;
    const middle = 0.5 * (low + high);
    stack.push(
      { box: right, range: dimension === 0 ? { low: middle, high } : entry.range },
      { box: entry.box, range: dimension === 0 ? { low, high: middle } : entry.range },
    );
  }
  return open;
}

describe('a damping that dips below zero within rounding', () => {
  /** m s² + 0.5((m − 118.048)² + offset) s + k. */
  function massAndDamper(offset: string): BoundaryPolynomials {
    const entries: WrittenEntry[] = [
      [0, 0, 2, 'p0'],
      [0, 0, 1, `0.5*((p0 - 118.048)^2 ${offset})`],
      [0, 0, 0, '400'],
    ];
    const loop = matrixLoop(1, entries);
    const polynomial = expandLoop(loop, new ExactEvaluator(loop.program, [100], [0]), -1);
    if (polynomial === undefined) throw new Error('not rational');
    return new BoundaryPolynomials(boundaryForm('stability', 0, 2), polynomial, [100], [200]);
  }

  it('is never proved', () => {
    const open = openParts(massAndDamper('- 1e-12'), { low: 60, high: 200 }, 1e-7);
    // Open parts are left, and they are where the damping changes its sign, at 118.048 ± 1e−6.
    expect(open.length).toBeGreaterThan(0);
    for (const { low, high } of open) {
      expect(low).toBeLessThan(118.0481);
      expect(high).toBeGreaterThan(118.0479);
    }
    expect(Math.min(...open.map(({ low }) => low))).toBeLessThanOrEqual(118.048 - 1e-6);
    expect(Math.max(...open.map(({ high }) => high))).toBeGreaterThanOrEqual(118.048 + 1e-6);
  });

  it('is proved when it stays above zero by more than rounding, and beside the dip', () => {
    expect(openParts(massAndDamper('+ 1e-6'), { low: 60, high: 200 }, 1e-7)).toEqual([]);
    expect(openParts(massAndDamper('- 1e-12'), { low: 60, high: 118 }, 1e-7)).toEqual([]);
    expect(openParts(massAndDamper('- 1e-12'), { low: 118.1, high: 200 }, 1e-7)).toEqual([]);
  });
});
