/** An entry in both of its forms: the text that the study carries, and the value that the direct computation uses. */
export interface Term {
  readonly text: string;
  /** Value at SI values of all parameters, in the order of the study. */
  readonly at: (point: ArrayLike<number>) => number;
}

export const constant = (value: number): Term => ({ text: String(value), at: () => value });

export const ZERO = constant(0);
export const ONE = constant(1);

export const parameterTerm = (id: string, index: number): Term => ({
  text: id,
  at: (point) => point[index],
});

const combined = (operator: string, a: Term, b: Term, value: (x: number, y: number) => number): Term => ({
  text: `(${a.text} ${operator} ${b.text})`,
  at: (point) => value(a.at(point), b.at(point)),
});

export function plus(a: Term, b: Term): Term {
  if (a === ZERO) return b;
  return b === ZERO ? a : combined('+', a, b, (x, y) => x + y);
}

export const minus = (a: Term, b: Term): Term => (b === ZERO ? a : combined('-', a, b, (x, y) => x - y));
export const divided = (a: Term, b: Term): Term => combined('/', a, b, (x, y) => x / y);
export const negative = (a: Term): Term =>
  a === ZERO ? ZERO : { text: `(-${a.text})`, at: (point) => -a.at(point) };
export const squared = (a: Term): Term => ({
  text: `(${a.text})^2`,
  at: (point) => a.at(point) * a.at(point),
});

export function times(a: Term, b: Term): Term {
  if (a === ZERO || b === ZERO) return ZERO;
  if (a === ONE) return b;
  return b === ONE ? a : combined('*', a, b, (x, y) => x * y);
}

export const scaled = (factor: number, a: Term): Term => times(constant(factor), a);
