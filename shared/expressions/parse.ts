import {
  type BinaryOperator,
  CONSTANTS,
  type Expression,
  ExpressionError,
  FUNCTION_NAMES,
  type FunctionName,
} from './expression';
import { type Token, readTokens } from './tokens';

/** Longest expression that is read, in characters. */
export const MAXIMUM_EXPRESSION_LENGTH = 2000;
/** Deepest nesting of brackets, signs and powers that is read. */
export const MAXIMUM_EXPRESSION_DEPTH = 64;

const BINDING: Readonly<Record<string, number>> = { '+': 1, '-': 1, '*': 2, '/': 2, '^': 4 };
/** A sign binds looser than a power and tighter than a product: −2^2 is −4, 2·−3 is −6. */
const SIGN_BINDING = 3;

class Parser {
  private readonly tokens: Token[];
  private next = 0;
  private depth = 0;

  constructor(text: string) {
    this.tokens = readTokens(text);
  }

  parse(): Expression {
    const result = this.expression(0);
    const rest = this.peek();
    if (rest.kind !== 'end') {
      throw new ExpressionError(
        rest.text === ')'
          ? 'a closing bracket without an opening one'
          : `an operator is missing before "${rest.text}"`,
        rest.position,
      );
    }
    return result;
  }

  private peek(): Token {
    return this.tokens[this.next];
  }

  private take(): Token {
    const token = this.tokens[this.next];
    if (token.kind !== 'end') this.next++;
    return token;
  }

  /** Precedence climbing: reads operands joined by operators that bind at least as tightly as `binding`. */
  private expression(binding: number): Expression {
    if (++this.depth > MAXIMUM_EXPRESSION_DEPTH) {
      throw new ExpressionError(
        `nested deeper than ${MAXIMUM_EXPRESSION_DEPTH} levels; name a part of it under definitions`,
        this.peek().position,
      );
    }
    let left = this.operand();
    for (;;) {
      const token = this.peek();
      const own = token.kind === 'symbol' ? BINDING[token.text] : undefined;
      if (own === undefined || own < binding) break;
      this.next++;
      const right = this.expression(token.text === '^' ? SIGN_BINDING : own + 1);
      left = {
        kind: 'binary',
        operator: token.text as BinaryOperator,
        left,
        right,
        position: token.position,
      };
    }
    this.depth--;
    return left;
  }

  private operand(): Expression {
    const token = this.take();
    if (token.kind === 'number') return { kind: 'number', value: token.value };
    if (token.kind === 'name') return this.nameOrCall(token);
    if (token.text === '(') return this.bracketed(token);
    if (token.text === '-') return { kind: 'negate', operand: this.expression(SIGN_BINDING) };
    if (token.text === '+') return this.expression(SIGN_BINDING);
    throw new ExpressionError(
      token.kind === 'end'
        ? 'ends where a number or a name should follow'
        : `"${token.text}" has nothing before it`,
      token.position,
    );
  }

  private bracketed(open: Token): Expression {
    const inner = this.expression(0);
    if (this.take().text !== ')') throw new ExpressionError('this bracket is not closed', open.position);
    return inner;
  }

  private nameOrCall(token: Token): Expression {
    const name = token.text as FunctionName;
    const isFunction = FUNCTION_NAMES.includes(name);
    const open = this.peek();
    if (open.text === '(') {
      if (!isFunction) {
        throw new ExpressionError(
          `"${name}" is not a function; there are ${FUNCTION_NAMES.join(', ')}`,
          token.position,
        );
      }
      this.next++;
      return { kind: 'call', name, argument: this.bracketed(open), position: token.position };
    }
    if (isFunction) throw new ExpressionError(`${name} needs its argument in brackets`, token.position);
    const constant = CONSTANTS.get(name);
    if (constant !== undefined) return { kind: 'number', value: constant };
    return { kind: 'name', name, position: token.position };
  }
}

/**
 * Parses an expression in `+ - * / ^`, brackets, the functions of FUNCTION_NAMES, `pi`, `g0`, decimal numbers and names.
 * `^` binds to the right and before the sign. Names are left unresolved.
 * @throws ExpressionError with the position of the offending character.
 */
export function parseExpression(text: string): Expression {
  if (text.length > MAXIMUM_EXPRESSION_LENGTH) {
    throw new ExpressionError(
      `has ${text.length} characters; at most ${MAXIMUM_EXPRESSION_LENGTH} are read, name parts of it under definitions`,
      MAXIMUM_EXPRESSION_LENGTH,
    );
  }
  return new Parser(text).parse();
}

/** Calls `visit` for every name that occurs in the expression, in reading order. */
export function visitNames(expression: Expression, visit: (name: string, position: number) => void): void {
  if (expression.kind === 'name') visit(expression.name, expression.position);
  else if (expression.kind === 'negate') visitNames(expression.operand, visit);
  else if (expression.kind === 'call') visitNames(expression.argument, visit);
  else if (expression.kind === 'binary') {
    visitNames(expression.left, visit);
    visitNames(expression.right, visit);
  }
}
