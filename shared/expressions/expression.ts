/** The functions an expression may call, by their names in a study. */
export const FUNCTION_NAMES = ['sqrt', 'sin', 'cos', 'tan', 'exp', 'log', 'abs'] as const;
export type FunctionName = (typeof FUNCTION_NAMES)[number];

/** Standard acceleration of free fall in m/s² (3rd CGPM 1901; ISO 80000-3), exact by definition. */
export const STANDARD_GRAVITY = 9.80665;

/** Named constants of the expression language; `pi` is the double nearest to π. */
export const CONSTANTS: ReadonlyMap<string, number> = new Map([
  ['pi', 3.141592653589793],
  ['g0', STANDARD_GRAVITY],
]);

export type BinaryOperator = '+' | '-' | '*' | '/' | '^';

/** Syntax tree of one expression. `position` is the offset of the character that a message should point at. */
export type Expression =
  | { readonly kind: 'number'; readonly value: number }
  | { readonly kind: 'name'; readonly name: string; readonly position: number }
  | { readonly kind: 'negate'; readonly operand: Expression }
  | {
      readonly kind: 'call';
      readonly name: FunctionName;
      readonly argument: Expression;
      readonly position: number;
    }
  | {
      readonly kind: 'binary';
      readonly operator: BinaryOperator;
      readonly left: Expression;
      readonly right: Expression;
      readonly position: number;
    };

/** A text that is not an expression; `position` counts characters from 0. */
export class ExpressionError extends Error {
  override readonly name = 'ExpressionError';

  constructor(
    message: string,
    readonly position: number,
  ) {
    super(message);
  }
}
