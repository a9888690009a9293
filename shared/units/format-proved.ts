import { fromSiDown, fromSiUp } from './convert';
import { ceilText, floorText } from './round-decimal';
import type { Unit } from './unit';

export interface ProvedFormat {
  /** `down` for the upper end of a proved range, `up` for its lower end: always into the range. */
  readonly side: 'down' | 'up';
  /** Significant digits, 4 unless said. */
  readonly significant?: number;
  /** The unit to show the SI value in; without it the value is shown as it is. */
  readonly unit?: Unit;
}

/**
 * Text of a proved value, converted from SI and rounded so that the shown range lies within the proved one. Trailing
 * zeros after the point are dropped; plain decimal notation throughout.
 *
 * Throws RangeError for a value that is not finite: "no value" needs words, not digits.
 */
export function formatProved(value: number, format: ProvedFormat): string {
  const { side, significant = 4, unit } = format;
  if (!Number.isInteger(significant) || significant < 1 || significant > 17) {
    throw new RangeError('The number of significant digits must be an integer from 1 to 17.');
  }
  if (!Number.isFinite(value)) throw new RangeError('Only a finite value can be shown as proved.');
  const convert = side === 'down' ? fromSiDown : fromSiUp;
  const shown = unit === undefined ? value : convert(value, unit);
  if (shown === 0) return '0';
  const decimals = significant - 1 - decimalExponent(shown);
  return withoutTrailingZeros(side === 'down' ? floorText(shown, decimals) : ceilText(shown, decimals));
}

/** The exponent of the leading decimal digit. */
function decimalExponent(value: number): number {
  const text = value.toExponential();
  return Number(text.slice(text.indexOf('e') + 1));
}

function withoutTrailingZeros(text: string): string {
  return text.includes('.') ? text.replace(/\.?0+$/, '') : text;
}
