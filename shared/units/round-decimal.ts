/**
 * Rounding of a double to a decimal place in a stated direction, exactly: a double is mantissa × 2^exponent, so its
 * scaled value is a ratio of two integers and its floor needs no floating-point arithmetic at all.
 */

const view = new DataView(new ArrayBuffer(8));

/** The largest multiple of 10^−decimals that is not above `value`, as text, with `decimals` places. */
export function floorText(value: number, decimals: number): string {
  return decimalText(scaledFloor(value, decimals), decimals);
}

/** The least multiple of 10^−decimals that is not below `value`, as text, with `decimals` places. */
export function ceilText(value: number, decimals: number): string {
  return decimalText(-scaledFloor(-value, decimals), decimals);
}

/** `floorText` as a number. The nearest double of a decimal that is not above a double is not above it either. */
export function roundDown(value: number, decimals: number): number {
  return Number(floorText(value, decimals));
}

/** `ceilText` as a number, never below `value`. */
export function roundUp(value: number, decimals: number): number {
  return Number(ceilText(value, decimals));
}

/** floor(value × 10^decimals). */
function scaledFloor(value: number, decimals: number): bigint {
  if (!Number.isFinite(value)) throw new RangeError('Only a finite value can be rounded.');
  if (!Number.isInteger(decimals) || Math.abs(decimals) > 400) {
    throw new RangeError('The number of decimals must be an integer within ±400.');
  }
  view.setFloat64(0, value);
  const bits = view.getBigUint64(0);
  const biased = Number((bits >> 52n) & 0x7ffn);
  const fraction = bits & 0xfffffffffffffn;
  const magnitude = biased === 0 ? fraction : fraction | 0x10000000000000n;
  const exponent = Math.max(biased, 1) - 1075;
  let numerator = bits >> 63n === 1n ? -magnitude : magnitude;
  let denominator = 1n;
  if (exponent >= 0) numerator <<= BigInt(exponent);
  else denominator <<= BigInt(-exponent);
  if (decimals >= 0) numerator *= powerOfTen(decimals);
  else denominator *= powerOfTen(-decimals);
  const quotient = numerator / denominator;
  return numerator < 0n && quotient * denominator !== numerator ? quotient - 1n : quotient;
}

function powerOfTen(exponent: number): bigint {
  return BigInt('1' + '0'.repeat(exponent));
}

function decimalText(scaled: bigint, decimals: number): string {
  const sign = scaled < 0n ? '-' : '';
  const digits = (scaled < 0n ? -scaled : scaled).toString();
  if (decimals <= 0) return digits === '0' ? '0' : sign + digits + '0'.repeat(-decimals);
  const padded = digits.padStart(decimals + 1, '0');
  return `${sign}${padded.slice(0, -decimals)}.${padded.slice(-decimals)}`;
}
