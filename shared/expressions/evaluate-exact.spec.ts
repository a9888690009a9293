import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { evaluateProgram } from './evaluate';
import { ExactEvaluator } from './evaluate-exact';
import { ExpansionLimitError } from './exact-polynomial';
import { parseExpression } from './parse';
import { ProgramBuilder } from './program';
import { rationalAt } from './testing/exact-value';
import { Fraction } from './testing/fraction';

const NAMES = ['x', 'y', 'c'];

function compile(text: string): { program: ProgramBuilder; node: number } {
  const program = new ProgramBuilder();
  const node = program.expression(parseExpression(text), (name) => program.parameter(NAMES.indexOf(name)));
  return { program, node };
}

/** Exact value at (x, y) with c = 0.1 known. */
function exactly(text: string, x: number, y: number): Fraction | undefined {
  const { program, node } = compile(text);
  const value = new ExactEvaluator(program, [NaN, NaN, 0.1], [0, 1]).node(node);
  return value && rationalAt(value, [Fraction.of(x), Fraction.of(y)]);
}

const { expression } = fc.letrec<{ expression: string }>((tie) => ({
  expression: fc.oneof(
    { maxDepth: 5 },
    fc.constantFrom('x', 'y', 'c', '2', '0.3', 'sqrt(c)', 'cos(c)'),
    fc
      .tuple(fc.constantFrom('+', '-', '*', '/'), tie('expression'), tie('expression'))
      .map(([operator, a, b]) => `(${a}${operator}${b})`),
    tie('expression').map((a) => `(-${a})`),
    fc.tuple(tie('expression'), fc.constantFrom('2', '3', '-1', '-2', '0')).map(([a, n]) => `(${a}^${n})`),
  ),
}));

describe('exact evaluation', () => {
  it('agrees with plain numbers', () => {
    let compared = 0;
    const coordinate = fc.double({ min: 0.5, max: 3, noNaN: true });
    fc.assert(
      fc.property(expression, coordinate, coordinate, (text, x, y) => {
        const { program, node } = compile(text);
        const values = new Float64Array(program.operations.length);
        evaluateProgram(program, [x, y, 0.1], values);
        // Large values on the way lose digits of the plain one.
        fc.pre(
          values.every(
            (value, id) => id === program.zero || (Math.abs(value) < 1e4 && Math.abs(value) > 1e-4),
          ),
        );
        const exact = exactly(text, x, y);
        expect(exact, text).toBeDefined();
        expect(Math.abs((exact?.toNumber() ?? NaN) - values[node]), text).toBeLessThan(1e-6);
        compared++;
      }),
      { seed: 1, numRuns: 400, maxSkipsPerRun: 1000 },
    );
    expect(compared).toBe(400);
  });

  it('keeps constants exact', () => {
    expect(exactly('c*3 - (c+c+c)', 1, 1)?.isZero).toBe(true);
    expect(exactly('(1/3)*3 - 1', 1, 1)?.isZero).toBe(true);
    expect(exactly('(x+1e20)-1e20-x', 0.3, 1)?.isZero).toBe(true);
    expect(exactly('2^0.5', 1, 1)?.toNumber()).toBe(Math.SQRT2);
    expect(exactly('x^c*0', 1, 1)?.isZero).toBe(true);
  });

  it('has no value where a variable enters otherwise than rationally', () => {
    for (const text of [
      'sqrt(x)',
      'sin(x*y)',
      'x^0.5',
      '2^x',
      'x^y',
      'abs(y)',
      '1+exp(x)/2',
      'x^33',
      '(-x)^c',
    ]) {
      expect(exactly(text, 1, 1), text).toBeUndefined();
    }
    for (const text of ['sqrt(c)', '2^c', 'x^(1+1)', 'x^(4*0.5)', 'x^32', 'sin(x*0)']) {
      expect(exactly(text, 1, 1), text).toBeDefined();
    }
  });

  it('refuses a division by zero and an expansion beyond its limits', () => {
    expect(() => exactly('1/(x-x)', 1, 1)).toThrow(RangeError);
    expect(() => exactly('(x^32)^2', 1, 1)).toThrow(ExpansionLimitError);
  });

  it('takes the variables in the order it is given them', () => {
    const { program, node } = compile('x^3*y');
    expect(new ExactEvaluator(program, [0, 0, 0], [1, 0]).node(node)?.numerator.degrees).toEqual([1, 3]);
    expect(new ExactEvaluator(program, [0, 5, 0], [0]).node(node)?.numerator.degrees).toEqual([3]);
    expect(new ExactEvaluator(program, [2, 5, 0], []).node(node)?.numerator.constantValue).toEqual({
      mantissa: 5n,
      exponent: 3,
    });
  });
});
