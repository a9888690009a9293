import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { evaluateProgram } from './evaluate';
import { ExactEvaluator } from './evaluate-exact';
import { evaluateInterval } from './evaluate-interval';
import { type DomainIssue, interval, type Interval, isDomainIssue } from './interval';
import { partWay } from './interval/testing/interval-and-point';
import { parseExpression } from './parse';
import { ProgramBuilder } from './program';
import { rationalAt } from './testing/exact-value';
import { Fraction } from './testing/fraction';

const NAMES = ['x', 'y'];

function compile(text: string): { program: ProgramBuilder; node: number } {
  const program = new ProgramBuilder();
  const node = program.expression(parseExpression(text), (name) => program.parameter(NAMES.indexOf(name)));
  return { program, node };
}

function enclose(text: string, x: Interval, y = interval(0, 0)): Interval | DomainIssue {
  const { program, node } = compile(text);
  return evaluateInterval(program, [x, y])[node];
}

function expressions(functions: readonly string[]): fc.Arbitrary<string> {
  return fc.letrec<{ expression: string }>((tie) => ({
    expression: fc.oneof(
      { maxDepth: 4 },
      fc.constantFrom('x', 'y', 'x', 'y', '2', '0.1', '3.7'),
      fc
        .tuple(fc.constantFrom('+', '-', '*', '/'), tie('expression'), tie('expression'))
        .map(([operator, a, b]) => `(${a}${operator}${b})`),
      tie('expression').map((a) => `(-${a})`),
      fc.tuple(tie('expression'), fc.constantFrom('2', '3', '-1')).map(([a, n]) => `(${a}^${n})`),
      ...functions.map((name) => tie('expression').map((a) => `${name}(${a})`)),
    ),
  })).expression;
}

const part = fc.double({ min: 0, max: 1, noNaN: true });
const range = fc
  .tuple(fc.double({ min: -5, max: 5, noNaN: true }), fc.double({ min: 0, max: 2, noNaN: true }))
  .map(([low, width]) => interval(low, low + width));

describe('interval evaluation', () => {
  it('encloses the exact values of rational expressions at every node', () => {
    let enclosed = 0;
    fc.assert(
      fc.property(expressions([]), range, range, part, part, (text, x, y, atX, atY) => {
        const { program } = compile(text);
        const values = evaluateInterval(program, [x, y]);
        const evaluator = new ExactEvaluator(program, [0, 0], [0, 1]);
        const point = [partWay(x.low, x.high, atX), partWay(y.low, y.high, atY)].map((value) =>
          Fraction.of(value),
        );
        values.forEach((value, id) => {
          if (isDomainIssue(value)) return;
          const node = evaluator.node(id);
          if (node === undefined) throw new Error(`${text} is not rational`);
          const exact = rationalAt(node, point);
          if (value.low !== -Infinity)
            expect(exact.compare(Fraction.of(value.low))).toBeGreaterThanOrEqual(0);
          if (value.high !== Infinity) expect(exact.compare(Fraction.of(value.high))).toBeLessThanOrEqual(0);
          enclosed++;
        });
      }),
      { seed: 1, numRuns: 400 },
    );
    expect(enclosed).toBeGreaterThan(1500);
  });

  it('encloses the plain values of all expressions at every node, within their own rounding', () => {
    let enclosed = 0;
    fc.assert(
      fc.property(
        expressions(['sqrt', 'sin', 'cos', 'tan', 'exp', 'log', 'abs']),
        range,
        range,
        part,
        part,
        (text, x, y, atX, atY) => {
          const { program } = compile(text);
          const point = [partWay(x.low, x.high, atX), partWay(y.low, y.high, atY)];
          const numbers = new Float64Array(program.operations.length);
          evaluateProgram(program, point, numbers);
          evaluateInterval(program, [x, y]).forEach((value, id) => {
            if (isDomainIssue(value) || !(Math.abs(numbers[id]) < 1e6)) return;
            const slack = 1e-9 * (1 + Math.abs(numbers[id]));
            expect(value.low, text).toBeLessThanOrEqual(numbers[id] + slack);
            expect(value.high, text).toBeGreaterThanOrEqual(numbers[id] - slack);
            enclosed++;
          });
        },
      ),
      { seed: 2, numRuns: 600 },
    );
    expect(enclosed).toBeGreaterThan(2500);
  });

  it('reports no issue at a point of the domain only and none without cause', () => {
    fc.assert(
      fc.property(expressions(['sqrt', 'log']), range, range, (text, x, y) => {
        const { program, node } = compile(text);
        const value = evaluateInterval(program, [x, y])[node];
        if (!isDomainIssue(value) || !value.everywhere) return;
        // Outside the domain at every point: no plain value is a finite number there.
        const numbers = new Float64Array(program.operations.length);
        for (const share of [0, 0.3, 1]) {
          const point = [partWay(x.low, x.high, share), partWay(y.low, y.high, share)];
          evaluateProgram(program, point, numbers);
          expect(numbers.every(Number.isFinite), text).toBe(false);
        }
      }),
      { seed: 3, numRuns: 600 },
    );
  });

  it('is exact where the ends are', () => {
    expect(enclose('2*x - 1', interval(1, 3))).toEqual({ low: 1, high: 5 });
    expect(enclose('x^2', interval(-1, 2))).toEqual({ low: 0, high: 4 });
    expect(enclose('-abs(x)', interval(-3, 2))).toEqual({ low: -3, high: 0 });
    expect(enclose('x/y', interval(1, 2), interval(-4, -2))).toEqual({ low: -1, high: -0.25 });
  });

  it.each([
    ['1/x', 'division-by-zero', false],
    ['x/0', 'division-by-zero', true],
    ['sqrt(x)', 'root-of-negative', false],
    ['sqrt(x-4)', 'root-of-negative', true],
    ['log(x+1)', 'logarithm-of-nonpositive', false],
    ['x^0.5', 'power-of-negative', false],
    ['tan(x*2)', 'pole-of-tangent', false],
  ])('%s over [−1, 1] has the issue %s', (text, cause, everywhere) => {
    const issue = { cause, everywhere };
    expect(enclose(text, interval(-1, 1))).toEqual(issue);
    // It reaches whatever uses the node, on either side.
    expect(enclose(`3 + 2*(${text})`, interval(-1, 1))).toEqual(issue);
    expect(enclose(`exp(${text})^2/y`, interval(-1, 1), interval(1, 2))).toEqual(issue);
    expect(enclose(`y - (${text})`, interval(-1, 1), interval(1, 2))).toEqual(issue);
    expect(enclose(`y ^ (${text})`, interval(-1, 1), interval(1, 2))).toEqual(issue);
  });

  it('names the first of two issues and leaves other nodes alone', () => {
    expect(enclose('log(x) + 1/x', interval(-1, 1))).toMatchObject({ cause: 'logarithm-of-nonpositive' });
    const { program, node } = compile('x + 1/x');
    const values = evaluateInterval(program, [interval(-1, 1)]);
    expect(isDomainIssue(values[node])).toBe(true);
    expect(values[program.parameter(0)]).toEqual({ low: -1, high: 1 });
  });
});
