import { describe, expect, it } from 'vitest';
import {
  binaryValue,
  errorInUlps,
  exactAcos,
  exactAsin,
  exactAtan,
  exactAtan2,
  exactCos,
  exactExp,
  exactLog,
  exactPow,
  exactSin,
  exactTan,
  piFixed,
} from './fixed-point-oracle';
import { seededArguments } from './seeded-arguments';

const TOLERANCE = 1n << 100n;

/** mantissa·2^320 of a value. */
function fixed(value: { mantissa: bigint; exponent: number }): bigint {
  const shift = value.exponent + 320;
  return shift >= 0 ? value.mantissa << BigInt(shift) : value.mantissa >> BigInt(-shift);
}

function expectClose(a: bigint, b: bigint): void {
  const difference = a > b ? a - b : b - a;
  expect(difference < TOLERANCE, `${a} and ${b}`).toBe(true);
}

/** The identities hold to 220 bits, which no common slip of series or reduction would leave intact. */
describe('reference arithmetic', () => {
  const draw = seededArguments(112);
  const one = 1n << 320n;

  it('knows the first digits of π', () => {
    // From memory.
    const digits = (piFixed(320) * 10n ** 30n) >> 320n;
    expect(digits.toString()).toBe('3141592653589793238462643383279');
  });

  it('holds sin² + cos² = 1, tan·cos = sin and the doubling of the angle', () => {
    for (let i = 0; i < 50; i += 1) {
      const x = draw.between(-1e9, 1e9);
      const s = fixed(exactSin(x));
      const c = fixed(exactCos(x));
      expectClose((s * s + c * c) >> 320n, one);
      expectClose((2n * s * c) >> 320n, fixed(exactSin(2 * x)));
      expectClose((c * c - s * s) >> 320n, fixed(exactCos(2 * x)));
      const t = exactTan(x);
      const tangentTimesCosine = (fixed({ mantissa: t.mantissa, exponent: t.exponent }) * c) >> 320n;
      expectClose(tangentTimesCosine, s);
    }
  });

  it('holds e^(a+b) = e^a·e^b, ln of products and powers', () => {
    for (let i = 0; i < 50; i += 1) {
      const a = Math.floor(draw.between(-40, 40)) / 8;
      const b = Math.floor(draw.between(-40, 40)) / 8;
      expectClose((fixed(exactExp(a)) * fixed(exactExp(b))) >> 320n, fixed(exactExp(a + b)));
      const u = 1 + Math.floor(draw.between(0, 1000)) / 64;
      const v = 1 + Math.floor(draw.between(0, 1000)) / 64;
      expectClose(fixed(exactLog(u)) + fixed(exactLog(v)), fixed(exactLog(u * v)));
      expectClose(fixed(exactPow(u, 1.5)), fixed(exactPow(u * u * u, 0.5)));
      expectClose(fixed(exactPow(u, 2)), fixed(binaryValue(u * u)));
    }
    expectClose(fixed(exactLog(1)), 0n);
  });

  it('joins the exponential and the logarithm, the sine and its inverse', () => {
    // 2^1 is formed as e^(1·ln 2).
    expectClose(fixed(exactPow(2, 1)), 2n * one);
    expectClose(fixed(exactAsin(0.5)) * 6n, piFixed(320));
    expectClose(fixed(exactAcos(0.5)) * 3n, piFixed(320));
    expectClose(fixed(exactAtan(1)) * 4n, piFixed(320));
    expectClose(fixed(exactAtan2(-1, -1)) * 4n, -3n * piFixed(320));
    for (let i = 0; i < 50; i += 1) {
      const x = Math.floor(draw.between(-1000, 1000)) / 1024;
      expectClose(fixed(exactAsin(x)) + fixed(exactAcos(x)), piFixed(320) >> 1n);
      if (x !== 0) {
        const sides = fixed(exactAtan2(x, 1)) + fixed(exactAtan2(1, x));
        expectClose(sides, piFixed(320) >> 1n);
      }
    }
  });

  it('measures errors in units in the last place', () => {
    expect(errorInUlps(1.0000000000000002, binaryValue(1))).toBe(1);
    expect(errorInUlps(1 - 2 ** -53, binaryValue(1))).toBe(0.5);
    expect(errorInUlps(5e-324, { mantissa: 1n, exponent: -1075 })).toBe(0.5);
    expect(errorInUlps(-3, binaryValue(-3))).toBe(0);
    expect(errorInUlps(NaN, binaryValue(1))).toBe(Infinity);
    expect(errorInUlps(Infinity, { mantissa: (1n << 54n) - 1n, exponent: 970 })).toBe(0.5);
  });
});
