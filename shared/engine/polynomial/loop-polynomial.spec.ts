import { describe, expect, it } from 'vitest';
import { ExactEvaluator, ExpansionLimitError } from '../../expressions';
import { polynomialAt, rationalAt } from '../../expressions/testing/exact-value';
import { Fraction, ONE, ZERO } from '../../expressions/testing/fraction';
import type { LoopMatrix } from '../loop/loop-matrix';
import { degreeOf, variableDegrees } from './exact-point';
import { expandLoop, type LoopPolynomial } from './loop-polynomial';
import { exactDeterminant, loopAt } from './testing/loop-at';
import { matrixLoop, type WrittenEntry } from './testing/matrix-loop';
import { seededRandom } from './testing/random';

function expand(loop: LoopMatrix, variables: number, law = -1): LoopPolynomial {
  const evaluator = new ExactEvaluator(
    loop.program,
    new Float64Array(8),
    Array.from({ length: variables }, (_, i) => i),
  );
  const result = expandLoop(loop, evaluator, law);
  if (result === undefined) throw new Error('not rational');
  return result;
}

/** The determinant at one place by elimination, with the entries of `law` multiplied by κ. */
function determinantAt(
  loop: LoopMatrix,
  law: number,
  s: Fraction,
  kappa: Fraction,
  point: readonly Fraction[],
): Fraction {
  const evaluator = new ExactEvaluator(loop.program, new Float64Array(8), [...point.keys()]);
  const matrix = Array.from({ length: loop.size }, () => new Array<Fraction>(loop.size).fill(ZERO));
  for (const { row, column, power, node, law: own } of loop.entries) {
    const value = evaluator.node(node);
    if (value === undefined) throw new Error('not rational');
    const factor = own >= 0 && own === law ? kappa : ONE;
    matrix[row][column] = matrix[row][column].add(
      rationalAt(value, point).multiply(s.power(power)).multiply(factor),
    );
  }
  return exactDeterminant(matrix);
}

const EXPRESSIONS = ['p0', 'p1', '1', '-2', '0.1', 'p0*p1', 'p0^2-3', '1-p1', '2.5', '-p0'];
const QUOTIENTS = [...EXPRESSIONS, '1/p0', 'p1/(p0+3)', '1/(3+p0)^2', '0.3/7', '2/(p0*p1)'];

function randomLoop(random: () => number, size: number, expressions: readonly string[]): LoopMatrix {
  const pick = <T>(list: readonly T[]): T => list[Math.floor(random() * list.length)];
  const entries: WrittenEntry[] = [];
  for (let row = 0; row < size; row++) {
    for (let column = 0; column < size; column++) {
      if (random() < 0.35 && row !== column) continue;
      const terms = 1 + Math.floor(random() * 2);
      for (let i = 0; i < terms; i++) {
        // One row returns through law 0, another through law 1.
        const law = row < 2 && random() < 0.5 ? row : -1;
        entries.push([row, column, Math.floor(random() * 3), pick(expressions), law]);
      }
    }
  }
  return matrixLoop(size, entries);
}

const random = seededRandom(21);
function place(): Fraction {
  return new Fraction(BigInt(Math.floor(random() * 40) - 19), BigInt(1 + Math.floor(random() * 9)));
}

describe('expansion of a loop', () => {
  it('is the determinant up to its sign, with the output of one law multiplied by κ', () => {
    for (let trial = 0; trial < 60; trial++) {
      const size = 1 + (trial % 5);
      const loop = randomLoop(random, size, EXPRESSIONS);
      for (const law of size > 1 ? [-1, 0, 1] : [-1, 0]) {
        const polynomial = expand(loop, 2, law);
        let sign: number | undefined;
        for (let sample = 0; sample < 4; sample++) {
          const [s, kappa, point] = [place(), place(), [place(), place()]];
          const value = loopAt(polynomial, s, kappa, point);
          const exact = determinantAt(loop, law, s, kappa, point);
          expect(value.abs().compare(exact.abs())).toBe(0);
          if (exact.isZero) continue;
          sign ??= value.compare(exact) === 0 ? 1 : -1;
          expect(value.compare(sign === 1 ? exact : exact.negate())).toBe(0);
        }
        if (law === -1) expect(polynomial.returned).toEqual([]);
      }
    }
  });

  it('with quotients is the determinant times a factor free of s and κ', () => {
    let compared = 0;
    const told = new Set<string>();
    for (let trial = 0; trial < 40; trial++) {
      const loop = randomLoop(random, 2 + (trial % 3), QUOTIENTS);
      const polynomial = expand(loop, 2, 0);
      const point = [new Fraction(BigInt(1 + trial), 7n), new Fraction(-5n, BigInt(2 + trial))];
      let factor: Fraction | undefined;
      for (let sample = 0; sample < 4; sample++) {
        const [s, kappa] = [place(), place()];
        const value = loopAt(polynomial, s, kappa, point);
        const exact = determinantAt(loop, 0, s, kappa, point);
        expect(value.isZero).toBe(exact.isZero);
        if (exact.isZero) continue;
        const ratio = value.divide(exact);
        factor ??= ratio;
        expect(ratio.compare(factor)).toBe(0);
        compared++;
      }
      for (const divisor of polynomial.divisors) {
        expect(divisor.constantValue).toBeUndefined();
        expect(polynomialAt(divisor, point).isZero).toBe(false);
        told.add(divisor.fingerprint);
      }
    }
    expect(compared).toBeGreaterThan(100);
    // p0, p0 + 3, (p0 + 3)² and p0 p1; the divisor 7 is none that could vanish.
    expect(told.size).toBe(4);
  });

  it('finds the true degrees where terms cancel', () => {
    // (p s + 1) s − p s · s = s
    const linear = expand(
      matrixLoop(2, [
        [0, 0, 1, 'p0'],
        [0, 0, 0, '1'],
        [0, 1, 1, '1'],
        [1, 0, 1, 'p0'],
        [1, 1, 1, '1'],
      ]),
      1,
    );
    expect(degreeOf(linear)).toBe(1);
    expect(variableDegrees(linear)).toEqual([0]);
    expect(linear.broken).toHaveLength(1);
    // Two rows that are proportional in exact arithmetic over the doubles 0.1 and 0.3: nothing is left.
    const nothing = expand(
      matrixLoop(2, [
        [0, 0, 2, '0.1*p0'],
        [0, 1, 1, '0.3'],
        [1, 0, 2, '0.1*p0*0.7'],
        [1, 1, 1, '0.3*0.7'],
      ]),
      1,
    );
    expect([...nothing.broken, ...nothing.returned]).toEqual([]);
    expect(degreeOf(nothing)).toBe(0);
  });

  it('cancels a divisor that a whole row shares', () => {
    const polynomial = expand(
      matrixLoop(2, [
        [0, 0, 2, '1/(1+p0)'],
        [0, 1, 0, 'p1/(1+p0)'],
        [1, 0, 0, '-1'],
        [1, 1, 1, '1'],
      ]),
      2,
    );
    expect(variableDegrees(polynomial)).toEqual([0, 1]);
    expect(degreeOf(polynomial)).toBe(3);
    // It is told all the same: at p0 = −1 the loop is not defined.
    expect(
      polynomial.divisors.map((divisor) => polynomialAt(divisor, [new Fraction(-1n), ONE]).isZero),
    ).toEqual([true]);
  });

  it('splits closed and broken loop: m s² + κ (k + c s)', () => {
    const loop = matrixLoop(2, [
      [0, 0, 2, 'p0'],
      [0, 1, 0, '-1'],
      [1, 1, 0, '1'],
      [1, 0, 0, '3', 0],
      [1, 0, 1, '0.5', 0],
    ]);
    const polynomial = expand(loop, 1, 0);
    const sign = polynomial.broken[0].coefficient < 0n ? -1n : 1n;
    const scale = Fraction.ofDyadic({ mantissa: sign, exponent: polynomial.exponent });
    const list = (terms: LoopPolynomial['broken']): string[] =>
      terms
        .map(
          ({ power, exponents, coefficient }) =>
            `${new Fraction(coefficient).multiply(scale).toString()} s${power} p${exponents.join()}`,
        )
        .sort();
    expect(list(polynomial.broken)).toEqual(['1/1 s2 p1']);
    expect(list(polynomial.returned)).toEqual(['1/2 s1 p0', '3/1 s0 p0']);
    // Law 1 does not exist: everything stays.
    expect(list(expand(loop, 1, 1).broken)).toHaveLength(3);
  });

  it('reaches 31 columns, the last whose set fits into one integer', () => {
    // A chain: s z_i = z_(i+1), closed by the last row: determinant s^31 ± p0.
    const entries: WrittenEntry[] = [];
    for (let i = 0; i < 31; i++) {
      entries.push([i, i, 1, '1'], i < 30 ? [i, i + 1, 0, '-1'] : [i, 0, 0, 'p0']);
    }
    const { broken } = expand(matrixLoop(31, entries), 1);
    expect(broken.map(({ power, exponents }) => [power, ...exponents]).sort()).toEqual([
      [0, 1],
      [31, 0],
    ]);
    // −1 thirty times cancels the sign of the cyclic permutation.
    expect(broken[0].coefficient).toBe(broken[1].coefficient);
  });

  it('has no value where a variable enters otherwise than rationally, and where it does not vary it has', () => {
    const loop = matrixLoop(1, [
      [0, 0, 1, 'sqrt(p0)'],
      [0, 0, 0, 'p1'],
    ]);
    const parameters = [4, 1];
    expect(expandLoop(loop, new ExactEvaluator(loop.program, parameters, [0]), -1)).toBeUndefined();
    const fixed = expandLoop(loop, new ExactEvaluator(loop.program, parameters, [1]), -1);
    expect(fixed && loopAt(fixed, ONE, ONE, [new Fraction(5n)]).toString()).toBe('7/1');
  });

  it('refuses what is too dense', () => {
    const entries: WrittenEntry[] = [];
    for (let row = 0; row < 14; row++) {
      for (let column = 0; column < 14; column++) {
        entries.push(
          [row, column, 1, `${Math.floor(1000 * random())}*p0`],
          [row, column, 0, `${Math.floor(1000 * random())}*p1+1`],
        );
      }
    }
    expect(() => expand(matrixLoop(14, entries), 2)).toThrow(ExpansionLimitError);
  });
});
