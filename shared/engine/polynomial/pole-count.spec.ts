import { describe, expect, it } from 'vitest';
import { toDyadic } from '../../expressions';
import { PolynomialRootSolver } from '../linalg';
import { boundaryForm, type ComplexCoefficients, gainForm } from './boundary-form';
import { countOutside, countOutsideBothHalves } from './pole-count';
import { seededRandom } from './testing/random';

/** Integer coefficients of a real polynomial, all scaled by one power of two; exact. */
function exactly(coefficients: readonly number[]): bigint[] {
  const parts = coefficients.map((value) => toDyadic(value));
  const least = Math.min(...parts.map(({ exponent }) => exponent));
  return parts.map(({ mantissa, exponent }) => mantissa << BigInt(exponent - least));
}

function count(
  coefficients: readonly number[],
  measure: 'stability' | 'dampingRatio' | 'decayRate' = 'stability',
  limit = 0,
) {
  const a = exactly(coefficients);
  const form = boundaryForm(measure, limit, a.length - 1);
  return countOutside(
    form.sheetsAt(
      a,
      a.map(() => 0n),
    )[0],
    form.cosine,
  );
}

/** Coefficients, ascending, of Π (s − root) with conjugates added. */
function fromRoots(roots: readonly (readonly [number, number])[]): number[] {
  let result = [1];
  for (const [re, im] of roots) {
    const factor = im === 0 ? [-re, 1] : [re * re + im * im, -2 * re, 1];
    const next = new Array<number>(result.length + factor.length - 1).fill(0);
    result.forEach((value, i) => {
      factor.forEach((other, j) => (next[i + j] += value * other));
    });
    result = next;
  }
  return result;
}

const random = seededRandom(51);

function randomRoots(size: number): [number, number][] {
  return Array.from({ length: size }, () => {
    const modulus = 10 ** (3 * random() - 1);
    const angle = Math.PI * random();
    return random() < 0.4
      ? [random() < 0.7 ? -modulus : modulus, 0]
      : [modulus * Math.cos(angle), modulus * Math.sin(angle)];
  });
}

describe('number of poles outside', () => {
  it.each([
    ['stability', 0],
    ['decayRate', 0.25],
    ['dampingRatio', 0.3],
    ['dampingRatio', 0.85],
  ] as const)('%s %d: as the roots say', (measure, limit) => {
    const solver = new PolynomialRootSolver(24);
    const re = new Float64Array(24);
    const im = new Float64Array(24);
    const seen = new Set<number>();
    let compared = 0;
    for (let trial = 0; trial < 250; trial++) {
      const a = fromRoots(randomRoots(1 + (trial % 6)));
      const roots = solver.solve(Float64Array.from(a), a.length - 1, re, im);
      let outside = 0;
      let nearest = Infinity;
      for (let i = 0; i < roots; i++) {
        const modulus = Math.hypot(re[i], im[i]);
        const distance =
          measure === 'decayRate'
            ? (re[i] + limit) / modulus
            : re[i] / modulus + (measure === 'dampingRatio' ? limit : 0);
        nearest = Math.min(nearest, Math.abs(distance));
        if (distance > 0) outside++;
      }
      if (nearest < 1e-6) continue;
      compared++;
      seen.add(outside);
      expect(count(a, measure, limit)).toBe(outside);
    }
    expect(compared).toBeGreaterThan(240);
    expect(seen.size).toBeGreaterThan(4);
  });

  it('tells an integral gain of 1e−14 from one of −1e−14', () => {
    // s³ + 2 s² + 3 s + ki, and the like of order 7.
    expect(count([1e-14, 3, 2, 1])).toBe(0);
    expect(count([-1e-14, 3, 2, 1])).toBe(1);
    const fast = fromRoots([
      [-1, 5],
      [-300, 100],
      [-4, 0],
      [-1e4, 0],
    ]);
    for (const gain of [1e-14, 1e-200]) {
      expect(count([gain, ...fast])).toBe(0);
      expect(count([-gain, ...fast])).toBe(1);
    }
  });

  it('is exact a few units beside the limit of stability', () => {
    // s³ + a s² + b s + a b has ±j√b on the axis.
    const product = 1.5 * 2.5;
    expect(count([product, 2.5, 1.5, 1])).toBeUndefined();
    expect(count([product * (1 - 2 ** -40), 2.5, 1.5, 1])).toBe(0);
    expect(count([product * (1 + 2 ** -40), 2.5, 1.5, 1])).toBe(2);
  });

  it('is never wrong where the exact coefficients have more digits than a double', () => {
    const form = boundaryForm('stability', 0, 3);
    const big = (): bigint => BigInt(Math.floor((1 + random()) * 2 ** 52)) * 4n + 1n;
    for (let trial = 0; trial < 200; trial++) {
      // s³ + a s² + b s + a b + shift: on the axis for shift 0, two outside for 1, none for −1.
      const [a, b] = [big(), big()];
      for (const [shift, outside] of [
        [0n, undefined],
        [1n, 2],
        [-1n, 0],
      ] as const) {
        const found = countOutside(form.sheetsAt([a * b + shift, b, a, 1n], [0n, 0n, 0n, 0n])[0]);
        expect([undefined, outside]).toContain(found);
      }
    }
  });

  it.each([
    ['a pair on the axis', [1, 0, 1]],
    [
      'a pair on the axis and one inside',
      fromRoots([
        [0, 2],
        [-1, 0],
      ]),
    ],
    ['a double pair on the axis', [1, 0, 2, 0, 1]],
    ['a root at the origin', [0, 1, 1]],
    ['the zero polynomial', [0, 0]],
    ['no coefficients', []],
  ] as const)('%s: undefined', (_, coefficients) => {
    const a = exactly(coefficients);
    const form = boundaryForm('stability', 0, Math.max(0, a.length - 1));
    expect(
      countOutside(
        form.sheetsAt(
          a,
          a.map(() => 0n),
        )[0],
      ),
    ).toBeUndefined();
  });

  it('of a constant is none, and leading zeros do not count as poles', () => {
    expect(count([-3])).toBe(0);
    expect(count([2, 3, 1, 0, 0])).toBe(0);
    expect(count([-2, 3, 1, 0, 0])).toBe(1);
  });

  it('bears coefficients far beyond the range of doubles', () => {
    // (s + R)(s − 2R)(s + 3R) = s³ + 2R s² − 5R² s − 6R³ with R = 10^200
    const large = 10n ** 200n;
    const form = boundaryForm('stability', 0, 3);
    const at = (a: bigint[]): number | undefined => countOutside(form.sheetsAt(a, [0n, 0n, 0n, 0n])[0]);
    expect(at([-6n * large ** 3n, -5n * large ** 2n, 2n * large, 1n])).toBe(1);
    // The same with 1/R, and all signs turned.
    expect(at([6n, 5n * large, -2n * large ** 2n, -(large ** 3n)])).toBe(1);
  });

  it('follows the loop gain: (s + 1)³ + κ·8 loses two poles at κ = 1', () => {
    const form = {
      measure: 'gainMargin',
      limit: 2,
      degree: 3,
      exponent: 0,
      sheets: 2,
      discRadius: undefined,
      cosine: 0,
    } as const;
    const sheets = gainForm(form, 0.999, 1.001).sheetsAt([1n, 3n, 3n, 1n], [8n, 0n, 0n, 0n]);
    expect(sheets.map((sheet) => countOutside(sheet))).toEqual([0, 2]);
  });
});

describe('poles of a complex polynomial', () => {
  /** Coefficients along the upper and the lower half of the axis, of p = Π (s − root) with integer roots. */
  function halves(roots: readonly (readonly [bigint, bigint])[]): [ComplexCoefficients, ComplexCoefficients] {
    let re = [1n];
    let im = [0n];
    for (const [x, y] of roots) {
      const shift = (list: bigint[]): bigint[] => [0n, ...list];
      const nextRe = shift(re).map((value, k) => value - x * (re[k] ?? 0n) + y * (im[k] ?? 0n));
      const nextIm = shift(im).map((value, k) => value - x * (im[k] ?? 0n) - y * (re[k] ?? 0n));
      re = nextRe;
      im = nextIm;
    }
    // c j^k; the lower half is that of the conjugate polynomial.
    const turned = (sign: bigint): ComplexCoefficients => {
      const out: ComplexCoefficients = { re: [], im: [] };
      re.forEach((value, k) => {
        const other = sign * im[k];
        out.re.push([value, -other, -value, other][k % 4]);
        out.im.push([other, value, -other, -value][k % 4]);
      });
      return out;
    };
    return [turned(1n), turned(-1n)];
  }

  it('are counted over both halves of the axis', () => {
    for (let trial = 0; trial < 100; trial++) {
      const integer = (): bigint => BigInt(Math.floor(random() * 41) - 20);
      const roots = Array.from({ length: 1 + (trial % 6) }, () => {
        const x = integer();
        return [x === 0n ? 3n : x, integer()] as const;
      });
      const outside = roots.filter(([x]) => x > 0n).length;
      expect(countOutsideBothHalves(...halves(roots))).toBe(outside);
    }
  });

  it('are not counted where one lies on the axis', () => {
    expect(
      countOutsideBothHalves(
        ...halves([
          [-1n, 2n],
          [0n, 3n],
        ]),
      ),
    ).toBeUndefined();
    expect(
      countOutsideBothHalves(
        ...halves([
          [-1n, 2n],
          [0n, -3n],
        ]),
      ),
    ).toBeUndefined();
  });
});
