import type { BinaryValue } from '../../elementary/testing/fixed-point-oracle';
import { binaryValue } from '../../elementary/testing/fixed-point-oracle';
import type { Interval } from '../interval';

/** −1, 0 or 1 as a is below, equal to or above b; exact. */
export function compareExactly(a: BinaryValue, b: BinaryValue): number {
  const common = Math.min(a.exponent, b.exponent);
  const left = a.mantissa << BigInt(a.exponent - common);
  const right = b.mantissa << BigInt(b.exponent - common);
  return left < right ? -1 : left > right ? 1 : 0;
}

export function addExactly(a: BinaryValue, b: BinaryValue): BinaryValue {
  const common = Math.min(a.exponent, b.exponent);
  return {
    mantissa: (a.mantissa << BigInt(a.exponent - common)) + (b.mantissa << BigInt(b.exponent - common)),
    exponent: common,
  };
}

export function multiplyExactly(a: BinaryValue, b: BinaryValue): BinaryValue {
  return { mantissa: a.mantissa * b.mantissa, exponent: a.exponent + b.exponent };
}

export function negateExactly(a: BinaryValue): BinaryValue {
  return { mantissa: -a.mantissa, exponent: a.exponent };
}

/** Whether the exact value lies in the interval, infinite ends being unbounded. */
export function encloses(x: Interval, value: BinaryValue): boolean {
  const aboveLow = x.low === -Infinity || compareExactly(binaryValue(x.low), value) <= 0;
  const belowHigh = x.high === Infinity || compareExactly(value, binaryValue(x.high)) <= 0;
  return aboveLow && belowHigh;
}
