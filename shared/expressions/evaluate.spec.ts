import { describe, expect, it } from 'vitest';
import { evaluateProgram } from './evaluate';
import { parseExpression } from './parse';
import { ProgramBuilder } from './program';

const NAMES = ['x', 'y'];

function evaluate(text: string, parameters: number[]): number {
  const program = new ProgramBuilder();
  const node = program.expression(parseExpression(text), (name) => program.parameter(NAMES.indexOf(name)));
  const values = new Float64Array(program.operations.length);
  evaluateProgram(program, parameters, values);
  return values[node];
}

describe('values of a program', () => {
  it.each<[string, (x: number, y: number) => number]>([
    ['x+y', (x, y) => x + y],
    ['x-y', (x, y) => x - y],
    ['x*y', (x, y) => x * y],
    ['x/y', (x, y) => x / y],
    ['-x', (x) => -x],
    ['x^y', (x, y) => x ** y],
    ['sqrt(x)', (x) => Math.sqrt(x)],
    ['sin(x)', (x) => Math.sin(x)],
    ['cos(x)', (x) => Math.cos(x)],
    ['tan(x)', (x) => Math.tan(x)],
    ['exp(x)', (x) => Math.exp(x)],
    ['log(x)', (x) => Math.log(x)],
    ['abs(-x)', (x) => Math.abs(x)],
    ['x*sin(y)^2/(1+y^2)-exp(-x*y)', (x, y) => (x * Math.sin(y) ** 2) / (1 + y ** 2) - Math.exp(-x * y)],
  ])('%s', (text, expected) => {
    for (const [x, y] of [
      [1.5, 2.25],
      [0.3, -1.7],
      [12, 0.01],
    ]) {
      const value = expected(x, y);
      expect(Math.abs(evaluate(text, [x, y]) - value)).toBeLessThanOrEqual(4e-15 * Math.abs(value));
    }
  });

  it.each([
    ['sqrt(x)', -1, NaN],
    ['log(x)', -1, NaN],
    ['log(x)', 0, -Infinity],
    ['1/x', 0, Infinity],
    ['0/x', 0, NaN],
    ['x^0.5', -1, NaN],
    ['x^-1', 0, Infinity],
  ])('outside the domain %s at %d is %d', (text, x, value) => {
    expect(evaluate(text, [x])).toBe(value);
  });
});
