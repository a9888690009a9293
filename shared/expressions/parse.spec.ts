import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { evaluateProgram } from './evaluate';
import { type Expression, ExpressionError } from './expression';
import { MAXIMUM_EXPRESSION_DEPTH, MAXIMUM_EXPRESSION_LENGTH, parseExpression } from './parse';
import { ProgramBuilder } from './program';

function valueOf(text: string): number {
  const program = new ProgramBuilder();
  const node = program.expression(parseExpression(text), (name) => {
    throw new Error(`unexpected name ${name}`);
  });
  const values = new Float64Array(program.operations.length);
  evaluateProgram(program, [], values);
  return values[node];
}

function failure(text: string): ExpressionError {
  try {
    parseExpression(text);
  } catch (error) {
    if (error instanceof ExpressionError) return error;
  }
  throw new Error(`${text} was not refused`);
}

/** Fully bracketed text of a tree. */
function bracketed(tree: Expression): string {
  switch (tree.kind) {
    case 'number':
      return String(tree.value);
    case 'name':
      return tree.name;
    case 'negate':
      return `(-${bracketed(tree.operand)})`;
    case 'call':
      return `${tree.name}(${bracketed(tree.argument)})`;
    case 'binary':
      return `(${bracketed(tree.left)}${tree.operator}${bracketed(tree.right)})`;
  }
}

describe('precedence', () => {
  it.each([
    ['-2^2', -4],
    ['(-2)^2', 4],
    ['2^3^2', 512],
    ['(2^3)^2', 64],
    ['2^-1', 0.5],
    ['2^-2^2', 0.0625],
    ['-2^-2', -0.25],
    ['2*-3', -6],
    ['2--3', 5],
    ['- -3', 3],
    ['+-+3', -3],
    ['1-2-3', -4],
    ['16/4/2', 2],
    ['2+3*4', 14],
    ['(2+3)*4', 20],
    ['2*3^2', 18],
    ['6/2*3', 9],
    ['1-2*3+4', -1],
    ['-2*3', -6],
    ['sqrt(16)^2', 16],
    ['-sqrt(4)*2', -4],
    ['abs(-3)', 3],
    ['pi', 3.141592653589793],
    ['2*g0', 19.6133],
    ['sqrt ( 4 )', 2],
  ])('%s is %d', (text, value) => {
    expect(valueOf(text)).toBe(value);
  });

  it('keeps the shape of any tree that is written out with brackets', () => {
    const { tree } = fc.letrec<{ tree: string }>((tie) => ({
      tree: fc.oneof(
        { maxDepth: 4, withCrossShrink: true },
        fc.constantFrom('a', 'bend', 'x_1', '7', '0.25', 'pi2'),
        fc
          .tuple(fc.constantFrom('+', '-', '*', '/', '^'), tie('tree'), tie('tree'))
          .map(([operator, left, right]) => `(${left}${operator}${right})`),
        tie('tree').map((inner) => `(-${inner})`),
        fc
          .tuple(fc.constantFrom('sin', 'exp', 'abs'), tie('tree'))
          .map(([name, inner]) => `${name}(${inner})`),
      ),
    }));
    fc.assert(
      fc.property(tree, (text) => {
        expect(bracketed(parseExpression(text))).toBe(text);
      }),
      { seed: 1, numRuns: 300 },
    );
  });

  it('gives the same value without brackets as the language of the tests does', () => {
    fc.assert(
      fc.property(
        fc.array(fc.tuple(fc.integer({ min: 1, max: 99 }), fc.constantFrom('+', '-', '*', '/')), {
          minLength: 2,
          maxLength: 12,
        }),
        (parts) => {
          const text = parts
            .map(([number, operator], i) => (i === 0 ? `${number}` : `${operator}${number}`))
            .join('');
          // Products from left to right, then sums from left to right.
          let sum = 0;
          let product = parts[0][0];
          for (const [number, operator] of parts.slice(1)) {
            if (operator === '*') product *= number;
            else if (operator === '/') product /= number;
            else {
              sum += product;
              product = operator === '+' ? number : -number;
            }
          }
          expect(valueOf(text)).toBeCloseTo(sum + product, 6);
        },
      ),
      { seed: 2, numRuns: 300 },
    );
  });
});

describe('names and positions', () => {
  it('keeps where names and operators stand', () => {
    expect(parseExpression('mass + 2*arm')).toEqual({
      kind: 'binary',
      operator: '+',
      position: 5,
      left: { kind: 'name', name: 'mass', position: 0 },
      right: {
        kind: 'binary',
        operator: '*',
        position: 8,
        left: { kind: 'number', value: 2 },
        right: { kind: 'name', name: 'arm', position: 9 },
      },
    });
  });

  it('takes pi and g0 for constants and everything close to them for names', () => {
    expect(parseExpression('pi')).toEqual({ kind: 'number', value: 3.141592653589793 });
    expect(parseExpression('g0')).toEqual({ kind: 'number', value: 9.80665 });
    for (const name of ['Pi', 'pi2', 'g', 'e', 'SIN'])
      expect(parseExpression(name)).toMatchObject({ kind: 'name' });
  });
});

describe('what is not an expression', () => {
  it.each([
    ['', 0, /ends where/],
    ['   ', 3, /ends where/],
    ['1 +', 3, /ends where/],
    ['(1 + 2', 0, /not closed/],
    ['2*(a+(b)', 2, /not closed/],
    ['sin(1', 3, /not closed/],
    ['1 + 2)', 5, /closing bracket/],
    ['()', 1, /nothing before/],
    ['* 2', 0, /nothing before/],
    ['1 * / 2', 4, /nothing before/],
    ['2 x', 2, /operator is missing/],
    ['2 (x)', 2, /operator is missing/],
    ['(x) (y)', 4, /operator is missing/],
    ['1..2', 2, /operator is missing/],
    ['a + sin', 4, /argument in brackets/],
    ['sin x', 0, /argument in brackets/],
    ['a + mass(2)', 4, /not a function/],
    ['2**3', 2, /nothing before/],
  ])('%s fails at %i', (text, position, message) => {
    const error = failure(text);
    expect(error.message).toMatch(message);
    expect(error.position).toBe(position);
  });

  it.each([
    ['process.exit(7)', 7],
    ['constructor.constructor("return 1")()', 11],
    ['constructor(1)', 0],
    ['toString()', 0],
    ['a.b', 1],
    ['a[0]', 1],
    ['x=>1', 1],
    ['x=1', 1],
    ['a;b', 1],
    ['`1`', 0],
    ["'1'", 0],
    ['{}', 0],
    ['!x', 0],
    ['a?b:c', 1],
    ['a%b', 1],
    ['a<b', 1],
    ['a,b', 1],
    ['1n', 1],
    ['0x10', 1],
    ['1_000', 1],
    ['new Date', 4],
    ['\\u0061', 0],
    ['a /* b */', 3],
    ['a // b', 3],
  ])('code is refused: %s', (text, position) => {
    expect(failure(text).position).toBe(position);
  });

  it('a word of the language of the program is but a name', () => {
    for (const name of ['constructor', 'prototype', 'eval', 'this', 'hasOwnProperty', 'toString']) {
      expect(parseExpression(name)).toEqual({ kind: 'name', name, position: 0 });
    }
  });

  it('an expression is refused beyond the longest length, and read at it', () => {
    const longest = `${'1+'.repeat(MAXIMUM_EXPRESSION_LENGTH / 2 - 1)}11`;
    expect(longest).toHaveLength(MAXIMUM_EXPRESSION_LENGTH);
    expect(valueOf(longest)).toBe(MAXIMUM_EXPRESSION_LENGTH / 2 - 1 + 11);
    expect(failure(`${longest}1`)).toMatchObject({ position: MAXIMUM_EXPRESSION_LENGTH });
  });

  it.each([
    ['brackets', '(', ')'],
    ['signs', '-', ''],
    ['powers', '1^', ''],
    ['calls', 'abs(', ')'],
  ])('deeper %s than the deepest nesting are refused', (_, open, close) => {
    const nested = (levels: number): string => `${open.repeat(levels)}1${close.repeat(levels)}`;
    expect(Math.abs(valueOf(nested(MAXIMUM_EXPRESSION_DEPTH - 1)))).toBe(1);
    const error = failure(nested(MAXIMUM_EXPRESSION_DEPTH));
    expect(error.message).toMatch(/nested deeper than 64/);
    expect(error.position).toBe(open.length * MAXIMUM_EXPRESSION_DEPTH);
    expect(failure(nested(300)).message).toMatch(/nested deeper/);
  });

  it('arbitrary text gives a tree or an error with a position inside the text, nothing else', () => {
    let trees = 0;
    fc.assert(
      fc.property(
        fc.array(fc.constantFrom(...'12.e+-*/^() apisn_x'), { maxLength: 14 }).map((list) => list.join('')),
        (text) => {
          try {
            parseExpression(text);
            trees++;
          } catch (error) {
            expect(error).toBeInstanceOf(ExpressionError);
            const { position } = error as ExpressionError;
            expect(position).toBeGreaterThanOrEqual(0);
            expect(position).toBeLessThanOrEqual(text.length);
          }
        },
      ),
      { seed: 3, numRuns: 3000 },
    );
    expect(trees).toBeGreaterThan(100);
  });
});
