import { formatProved } from '../../../../shared/units';

/** Thin space: a figure and its unit stay together and are read as one. */
const THIN_SPACE = '\u2009';

/** Minus, not a hyphen. */
export function withMinus(text: string): string {
  return text.replace('-', '\u2212');
}

export function withUnit(figure: string, unit: string | null | undefined): string {
  return unit === null || unit === undefined || unit === '' ? figure : `${figure}${THIN_SPACE}${unit}`;
}

/** The upper end of a proved range: never more than was proved. */
export function provedTo(value: number, significant = 4): string {
  return withMinus(formatProved(value, { side: 'down', significant }));
}

/** The lower end of a proved range: never less than was proved. */
export function provedFrom(value: number, significant = 4): string {
  return withMinus(formatProved(value, { side: 'up', significant }));
}

/**
 * A failing value above a proved range is rounded up and one below it down: what is shown as failing always has a
 * proved failure between it and the proved range.
 */
export function failsAbove(value: number): string {
  return withMinus(formatProved(value, { side: 'up' }));
}

export function failsBelow(value: number): string {
  return withMinus(formatProved(value, { side: 'down' }));
}

/** Reserve with its sign, never more than there is. */
export function reserveFigure(value: number): string {
  const text = provedTo(value, 3);
  return value > 0 && text !== '0' ? `+${text}` : text;
}

/** A figure that is no proof, to four significant digits. */
export function plainFigure(value: number): string {
  const rounded = Number(value.toPrecision(4));
  const size = Math.abs(rounded);
  if (size !== 0 && (size >= 1e7 || size < 1e-4)) {
    const [digits, exponent] = rounded.toExponential().split('e');
    return withMinus(`${digits}\u00a0×\u00a010${superscript(Number(exponent))}`);
  }
  return withMinus(String(rounded));
}

const SUPERSCRIPTS: Record<string, string> = {
  '-': '⁻',
  ...Object.fromEntries([...'⁰¹²³⁴⁵⁶⁷⁸⁹'].map((sign, digit) => [String(digit), sign])),
};

function superscript(exponent: number): string {
  return [...String(exponent)].map((sign) => SUPERSCRIPTS[sign] ?? sign).join('');
}
