/** A figure that is no proof, to at most six significant digits, with a minus and not a hyphen. */
export function figureText(value: number): string {
  return String(Number(value.toPrecision(6))).replace(/-/g, '\u2212');
}

/** A figure and its unit, kept together by a thin space. */
export function withUnit(value: number, unit: string): string {
  return unit === '' ? figureText(value) : `${figureText(value)}\u2009${unit}`;
}
