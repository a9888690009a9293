import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { bitLength, fromDyadic, toDyadic, trailingZeros } from './dyadic';
import { nextDown, nextUp } from './interval/rounding';

/** Sign of a · 2^i − b · 2^j. */
function compare(a: bigint, i: number, b: bigint, j: number): number {
  const common = Math.min(i, j);
  const difference = (a << BigInt(i - common)) - (b << BigInt(j - common));
  return difference < 0n ? -1 : difference > 0n ? 1 : 0;
}

/** Whether `value` is the double nearest to mantissa · 2^exponent, ties to even; within the range of doubles. */
function isNearest(value: number, mantissa: bigint, exponent: number): boolean {
  const midpointSign = (neighbour: number): number => {
    // Both neighbours are multiples of 2^−1074: twice the midpoint is their sum.
    const sum = asUnits(value) + asUnits(neighbour);
    return compare(mantissa * 2n, exponent, sum, -1074);
  };
  const even = asBits(value) % 2n === 0n;
  const above = midpointSign(nextUp(value));
  const below = midpointSign(nextDown(value));
  return (above < 0 || (above === 0 && even)) && (below > 0 || (below === 0 && even));
}

function asUnits(value: number): bigint {
  const { mantissa, exponent } = toDyadic(value);
  return mantissa << BigInt(exponent + 1074);
}

function asBits(value: number): bigint {
  return new BigUint64Array(new Float64Array([value]).buffer)[0];
}

const anyDouble = fc.oneof(
  fc.double({ noNaN: true, noDefaultInfinity: true }),
  fc.double({ min: -2.2250738585072014e-308, max: 2.2250738585072014e-308, noNaN: true }),
  fc.double({ min: -1e3, max: 1e3, noNaN: true }),
  fc.integer().map(Number),
);

describe('exact values of doubles', () => {
  it.each([
    [0, 0n, 0],
    [-0, 0n, 0],
    [1, 1n, 0],
    [-6, -3n, 1],
    [0.1, 3602879701896397n, -55],
    [5e-324, 1n, -1074],
    [2.2250738585072014e-308, 1n, -1022],
    [-2.225073858507201e-308, -4503599627370495n, -1074],
    [Number.MAX_VALUE, 9007199254740991n, 971],
  ])('of %d', (value, mantissa, exponent) => {
    expect(toDyadic(value)).toEqual({ mantissa, exponent });
  });

  it('come back unchanged, with an odd mantissa', () => {
    fc.assert(
      fc.property(anyDouble, (value) => {
        const { mantissa, exponent } = toDyadic(value);
        expect(mantissa === 0n || mantissa % 2n !== 0n).toBe(true);
        // A zero has lost its sign.
        expect(fromDyadic(mantissa, exponent)).toBe(value === 0 ? 0 : value);
      }),
      { seed: 1, numRuns: 3000 },
    );
  });
});

describe('rounding to a double', () => {
  it('is to nearest', () => {
    const integer = fc.oneof(
      fc.bigInt({ min: -(1n << 70n), max: 1n << 70n }),
      fc.bigInt({ min: -(1n << 300n), max: 1n << 300n }),
    );
    fc.assert(
      fc.property(integer, fc.integer({ min: -1450, max: 650 }), (mantissa, exponent) => {
        const value = fromDyadic(mantissa, exponent);
        expect(isNearest(value, mantissa, exponent), `${mantissa} · 2^${exponent} → ${value}`).toBe(true);
      }),
      { seed: 2, numRuns: 5000 },
    );
  });

  it('is to even in a tie and never in a tie that a last bit breaks', () => {
    fc.assert(
      fc.property(
        fc.bigInt({ min: 1n << 52n, max: (1n << 53n) - 1n }),
        fc.integer({ min: 1, max: 200 }),
        fc.constantFrom(-1n, 0n, 1n),
        fc.boolean(),
        fc.integer({ min: -1380, max: 700 }),
        (kept, extra, tail, negative, exponent) => {
          // Half a unit in the 53rd place, and one in the last of all places to either side.
          const magnitude = (((kept << 1n) | 1n) << BigInt(extra)) + tail;
          const mantissa = negative ? -magnitude : magnitude;
          expect(isNearest(fromDyadic(mantissa, exponent), mantissa, exponent)).toBe(true);
        },
      ),
      { seed: 3, numRuns: 5000 },
    );
    expect(fromDyadic((1n << 53n) + 1n, 0)).toBe(2 ** 53);
    expect(fromDyadic((1n << 53n) + 3n, 0)).toBe(2 ** 53 + 4);
    expect(fromDyadic((((1n << 53n) + 1n) << 100n) + 1n, -100)).toBe(2 ** 53 + 2);
  });

  it('rounds once where the result is subnormal', () => {
    fc.assert(
      fc.property(
        fc.bigInt({ min: 1n, max: (1n << 51n) - 1n }),
        fc.integer({ min: 1, max: 120 }),
        fc.constantFrom(-1n, 0n, 1n),
        (units, extra, tail) => {
          const mantissa = (((units << 1n) | 1n) << BigInt(extra)) + tail;
          const exponent = -1075 - extra;
          expect(isNearest(fromDyadic(mantissa, exponent), mantissa, exponent)).toBe(true);
        },
      ),
      { seed: 4, numRuns: 3000 },
    );
    // Just above the tie between 2^−1074 and 2^−1073: rounding to 53 bits first would make it a tie.
    expect(fromDyadic((3n << 60n) + 1n, -1135)).toBe(1e-323);
    expect(fromDyadic(1n, -1075)).toBe(0);
    expect(fromDyadic((1n << 60n) + 1n, -1135)).toBe(5e-324);
    expect(fromDyadic(1n, -5000)).toBe(0);
    expect(fromDyadic(0n, -5000)).toBe(0);
  });

  it('overflows from half a unit above the largest double', () => {
    const tie = ((1n << 54n) - 1n) << 10n;
    expect(fromDyadic(tie, 960)).toBe(Infinity);
    expect(fromDyadic(-tie, 960)).toBe(-Infinity);
    expect(fromDyadic(tie - 1n, 960)).toBe(Number.MAX_VALUE);
    expect(fromDyadic(1n, 5000)).toBe(Infinity);
  });
});

describe('bits of integers', () => {
  it('are counted', () => {
    fc.assert(
      fc.property(fc.bigInt({ min: 0n, max: 1n << 200n }), fc.nat(130), (value, shift) => {
        const shifted = ((value << 1n) | 1n) << BigInt(shift);
        expect(trailingZeros(shifted)).toBe(shift);
        expect(trailingZeros(-shifted)).toBe(shift);
        expect(bitLength(shifted)).toBe(shifted.toString(2).length);
        expect(bitLength(-shifted)).toBe(bitLength(shifted));
      }),
      { seed: 5 },
    );
    expect(bitLength(0n)).toBe(0);
  });
});
