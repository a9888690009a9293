import type { Scalar } from '../../../../shared/contracts';

const NUMBER = /^[+-]?(?:\d+\.?\d*|\.\d+)(?:e[+-]?\d+)?$/i;
const DECIMAL_COMMA = /^([+-]?\d*),(\d+(?:e[+-]?\d+)?)$/i;
/** One to three digits, not starting with 0, a comma and three digits: 1,234 is either 1234 or 1.234. */
const THOUSANDS = /^[+-]?[1-9]\d{0,2}(?:,\d{3})+$/;

/**
 * What a person typed: a number where it is one, with decimal point or unambiguous decimal comma, else the expression as
 * typed. An empty text is none.
 */
export function readScalarText(text: string): Scalar | undefined {
  const plain = text.trim().replace(/[\u2212\u2013]/g, '-');
  if (plain === '') return undefined;
  const pointed = isAmbiguous(plain) ? plain : plain.replace(DECIMAL_COMMA, '$1.$2');
  if (!NUMBER.test(pointed)) return plain;
  const value = Number(pointed);
  return Number.isFinite(value) ? value : plain;
}

/** Whether a comma could mark thousands as well as decimals. */
export function isAmbiguous(text: string): boolean {
  return THOUSANDS.test(text.trim());
}

/** The text that a value is edited as: every digit of a number, an expression as it was written. */
export function scalarText(value: Scalar | undefined): string {
  if (value === undefined) return '';
  if (typeof value === 'string') return value;
  const size = Math.abs(value);
  const plain =
    size !== 0 && (size >= 1e7 || size < 1e-4) ? value.toExponential().replace('e+', 'e') : String(value);
  return plain.replaceAll('-', '\u2212');
}

/** A computed figure beside an expression, to four significant digits. */
export function figureText(value: number): string {
  return scalarText(Number(value.toPrecision(4)));
}
