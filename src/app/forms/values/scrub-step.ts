/** Step of a value of which nothing but zero is known. */
const STEP_AT_ZERO = 0.01;

/** One unit of the third significant digit. */
export function scrubStep(value: number): number {
  if (value === 0 || !Number.isFinite(value)) return STEP_AT_ZERO;
  const text = Math.abs(value).toExponential();
  return Number(`1e${Number(text.slice(text.indexOf('e') + 1)) - 2}`);
}

/** The value moved by so many steps, without the dust of binary fractions. */
export function stepped(value: number, steps: number, step = scrubStep(value)): number {
  return Number((value + steps * step).toPrecision(12));
}
