import { describe, expect, it } from 'vitest';
import { ExpressionError } from './expression';
import { readTokens } from './tokens';

describe('tokens', () => {
  it('are numbers, names and symbols at their positions, closed by an end', () => {
    expect(readTokens('2.5e-3*k_1 +(.5)')).toEqual([
      { kind: 'number', value: 0.0025, text: '2.5e-3', position: 0 },
      { kind: 'symbol', text: '*', position: 6 },
      { kind: 'name', text: 'k_1', position: 7 },
      { kind: 'symbol', text: '+', position: 11 },
      { kind: 'symbol', text: '(', position: 12 },
      { kind: 'number', value: 0.5, text: '.5', position: 13 },
      { kind: 'symbol', text: ')', position: 15 },
      { kind: 'end', text: '', position: 16 },
    ]);
  });

  it.each([
    ['1.', 1],
    ['1.e3', 1000],
    ['007', 7],
    ['1E+2', 100],
    ['5e-324', 5e-324],
    ['1e-400', 0],
  ])('reads %s as one number', (text, value) => {
    const tokens = readTokens(text);
    expect(tokens).toHaveLength(2);
    expect(tokens[0]).toMatchObject({ kind: 'number', value });
  });

  it('leaves an exponent without digits to the name that follows', () => {
    expect(readTokens('2e').map(({ text }) => text)).toEqual(['2', 'e', '']);
  });

  it('skips blanks and line ends', () => {
    expect(readTokens(' \t1\r\n+ 2 ').map(({ position }) => position)).toEqual([2, 5, 7, 9]);
  });

  it.each([
    ['a.b', 1],
    ['1 + $x', 4],
    ['a_', -1],
    ['_a', 0],
    ['x=>1', 1],
    ['m²', 1],
    ['a, b', 1],
    ['"text"', 0],
    ['1 - −1', 4],
    ['a b\u00a0', 3],
  ])('%s has its first foreign character at %i', (text, position) => {
    if (position < 0) {
      expect(readTokens(text)).toHaveLength(2);
      return;
    }
    expect(() => readTokens(text)).toThrow(
      expect.objectContaining({ name: 'ExpressionError', position }) as ExpressionError,
    );
  });

  it('refuses a number beyond the largest double', () => {
    expect(() => readTokens('1 + 1e309')).toThrow(new ExpressionError('the number 1e309 is too large', 4));
  });
});
