import type { BinaryValue } from './fixed-point-oracle';
import { binaryValue } from './fixed-point-oracle';

/** |high + low − exact| in absolute terms, formed without rounding below 2^−400. */
export function pairError(high: number, low: number, exact: BinaryValue): number {
  const bits = 400;
  const fixed = (value: BinaryValue): bigint => {
    const shift = value.exponent + bits;
    return shift >= 0 ? value.mantissa << BigInt(shift) : value.mantissa >> BigInt(-shift);
  };
  const difference = fixed(binaryValue(high)) + fixed(binaryValue(low)) - fixed(exact);
  const size = difference < 0n ? -difference : difference;
  return Number(size >> BigInt(bits - 200)) / Number(1n << 200n);
}
