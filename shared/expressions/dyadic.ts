import { scaleByPowerOfTwo } from './elementary/float-bits';

/** An exact number m · 2^e; every finite double is one. */
export interface Dyadic {
  readonly mantissa: bigint;
  readonly exponent: number;
}

const float = new Float64Array(1);
const bits = new BigUint64Array(float.buffer);
const FRACTION = (1n << 52n) - 1n;

/** The exact value of a finite double, with an odd mantissa (or 0 · 2^0). */
export function toDyadic(value: number): Dyadic {
  if (value === 0) return { mantissa: 0n, exponent: 0 };
  float[0] = value;
  const word = bits[0];
  const field = Number((word >> 52n) & 0x7ffn);
  let mantissa = word & FRACTION;
  let exponent = field === 0 ? -1074 : field - 1075;
  if (field !== 0) mantissa |= 1n << 52n;
  const zeros = trailingZeros(mantissa);
  mantissa >>= BigInt(zeros);
  exponent += zeros;
  return { mantissa: value < 0 ? -mantissa : mantissa, exponent };
}

/** Number of trailing zero bits of a non-zero integer. */
export function trailingZeros(value: bigint): number {
  let count = 0;
  for (let rest = value; ; rest >>= 32n, count += 32) {
    const low = Number(BigInt.asUintN(32, rest));
    if (low !== 0) return count + 31 - Math.clz32(low & -low);
  }
}

/** Number of bits of |value|; 0 for 0. */
export function bitLength(value: bigint): number {
  const hex = (value < 0n ? -value : value).toString(16);
  return value === 0n ? 0 : (hex.length - 1) * 4 + 32 - Math.clz32(parseInt(hex.charAt(0), 16));
}

/**
 * The double nearest to mantissa · 2^exponent, ties to even, also where it is subnormal; ±Infinity beyond the
 * largest double.
 */
export function fromDyadic(mantissa: bigint, exponent: number): number {
  const length = bitLength(mantissa);
  // A double holds 53 bits, a subnormal one as many as lie above 2^−1074.
  const precision = Math.min(53, length + exponent + 1074);
  if (length <= precision) return scaleByPowerOfTwo(Number(mantissa), exponent);
  if (precision < 0) return mantissa < 0n ? -0 : 0;
  const excess = BigInt(length - precision);
  const magnitude = mantissa < 0n ? -mantissa : mantissa;
  const kept = magnitude >> excess;
  const twiceRest = (magnitude - (kept << excess)) << 1n;
  const unit = 1n << excess;
  const up = twiceRest > unit || (twiceRest === unit && (kept & 1n) === 1n);
  const rounded = Number(up ? kept + 1n : kept);
  return scaleByPowerOfTwo(mantissa < 0n ? -rounded : rounded, exponent + length - precision);
}
