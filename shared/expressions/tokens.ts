import { ExpressionError } from './expression';

export type Token =
  | { readonly kind: 'number'; readonly value: number; readonly text: string; readonly position: number }
  | { readonly kind: 'name'; readonly text: string; readonly position: number }
  | { readonly kind: 'symbol'; readonly text: string; readonly position: number }
  | { readonly kind: 'end'; readonly text: ''; readonly position: number };

const NUMBER = /(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d+)?/y;
const NAME = /[A-Za-z][A-Za-z0-9_]*/y;
const SPACE = /[ \t\r\n]+/y;
const SYMBOLS = '+-*/^()';

/**
 * Splits an expression into tokens; the last one is always `end`.
 * @throws ExpressionError at the first character that belongs to no token, and at a number too large for a double.
 */
export function readTokens(text: string): Token[] {
  const tokens: Token[] = [];
  let position = 0;
  const match = (pattern: RegExp): string | undefined => {
    pattern.lastIndex = position;
    return pattern.exec(text)?.[0];
  };
  while (position < text.length) {
    const space = match(SPACE);
    if (space !== undefined) {
      position += space.length;
      continue;
    }
    const number = match(NUMBER);
    const name = number === undefined ? match(NAME) : undefined;
    const character = text.charAt(position);
    if (number !== undefined) {
      const value = Number(number);
      if (!Number.isFinite(value)) throw new ExpressionError(`the number ${number} is too large`, position);
      tokens.push({ kind: 'number', value, text: number, position });
    } else if (name !== undefined) {
      tokens.push({ kind: 'name', text: name, position });
    } else if (SYMBOLS.includes(character)) {
      tokens.push({ kind: 'symbol', text: character, position });
    } else {
      throw new ExpressionError(`the character "${character}" has no meaning here`, position);
    }
    position += number?.length ?? name?.length ?? 1;
  }
  tokens.push({ kind: 'end', text: '', position });
  return tokens;
}
