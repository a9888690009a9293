import { describe, expect, it } from 'vitest';
import { binaryExponent, fromWords, highWord, lowWord, powerOfTwo, scaleByPowerOfTwo } from './float-bits';

describe('bits of doubles', () => {
  it('reads and writes the two words', () => {
    expect(highWord(1)).toBe(0x3ff00000);
    expect(lowWord(1)).toBe(0);
    expect(highWord(-2)).toBe(0xc0000000);
    expect(lowWord(5e-324)).toBe(1);
    expect(fromWords(0x3ff00000, 1)).toBe(1.0000000000000002);
    expect(fromWords(highWord(-Math.PI), lowWord(-Math.PI))).toBe(-Math.PI);
  });

  it('builds powers of two', () => {
    expect(powerOfTwo(0)).toBe(1);
    expect(powerOfTwo(-1022)).toBe(2.2250738585072014e-308);
    expect(powerOfTwo(1023)).toBe(8.98846567431158e307);
    for (let k = -1080; k <= 1030; k++) expect(powerOfTwo(k)).toBe(2 ** k);
    expect(powerOfTwo(-60000)).toBe(0);
    expect(powerOfTwo(60000)).toBe(Infinity);
  });

  it('scales with one rounding into the subnormal range', () => {
    // 1 + 2^−52 scaled to 2^−1074·(0.5 + 2^−53): above the half, so it rounds up, not to even.
    expect(scaleByPowerOfTwo(1.0000000000000002, -1075)).toBe(5e-324);
    expect(scaleByPowerOfTwo(1, -1075)).toBe(0);
    expect(scaleByPowerOfTwo(3, -1075)).toBe(1e-323);
    expect(scaleByPowerOfTwo(1e-20, 1060)).toBe(1e-20 * 2 ** 1000 * 2 ** 60);
    expect(scaleByPowerOfTwo(-1.5, 1023)).toBe(-1.5 * 8.98846567431158e307);
    expect(scaleByPowerOfTwo(-1.5, 1024)).toBe(-Infinity);
    expect(scaleByPowerOfTwo(-1.5, 60000)).toBe(-Infinity);
    expect(scaleByPowerOfTwo(-1.5, -60000)).toBe(-0);
  });

  it('scales from one end of the range to the other', () => {
    expect(scaleByPowerOfTwo(5e-324, 2097)).toBe(2 ** 1023);
    expect(scaleByPowerOfTwo(5e-324, 2098)).toBe(Infinity);
    expect(scaleByPowerOfTwo(Number.MAX_VALUE, -2097)).toBe(1e-323);
    expect(scaleByPowerOfTwo(Number.MAX_VALUE, -2098)).toBe(5e-324);
    expect(scaleByPowerOfTwo(2 ** 1023, -2098)).toBe(0);
    expect(scaleByPowerOfTwo(2 ** 1023 * 1.0000000000000002, -2098)).toBe(5e-324);
    expect(scaleByPowerOfTwo(2 ** 1000, -2000)).toBe(2 ** -1000);
    expect(scaleByPowerOfTwo(0, 5000)).toBe(0);
    expect(scaleByPowerOfTwo(-Infinity, -5000)).toBe(-Infinity);
    expect(scaleByPowerOfTwo(NaN, 3)).toBeNaN();
  });

  it.each([
    [1, 0],
    [-1.999, 0],
    [2, 1],
    [0.75, -1],
    [Number.MAX_VALUE, 1023],
    [2 ** -1022, -1022],
    [2 ** -1040 * 1.5, -1040],
    [5e-324, -1074],
  ])('gives the binary exponent of %d: %i', (x, e) => {
    expect(binaryExponent(x)).toBe(e);
  });
});
