import { describe, expect, it } from 'vitest';
import { binaryValue, piFixed } from '../elementary/testing/fixed-point-oracle';
import { halfTurnsWithin } from './half-turns';
import { nextDown, nextUp } from './rounding';
import { compareExactly } from './testing/containment';

const PI = piFixed(320);

/** The greatest double not above k·π/2. */
function below(k: number): number {
  const exact = { mantissa: BigInt(k) * PI, exponent: -321 };
  let x = (k * Math.PI) / 2;
  while (compareExactly(binaryValue(x), exact) > 0) x = nextDown(x);
  while (compareExactly(binaryValue(nextUp(x)), exact) <= 0) x = nextUp(x);
  return x;
}

describe('half turns within an interval', () => {
  it('misses none between neighbouring doubles', () => {
    for (let k = -1500; k <= 1500; k += 1) {
      if (k === 0) continue;
      const low = below(k);
      const found = halfTurnsWithin({ low, high: nextUp(low) }, k % 2 === 0 ? 0 : 0.5);
      const expected = Math.floor(k / 2);
      expect(found !== undefined && found.first <= expected && found.last >= expected, `${k}`).toBe(true);
    }
  });

  it('counts those inside', () => {
    expect(halfTurnsWithin({ low: 3, high: 10 }, 0)).toEqual({ first: 1, last: 3 });
    expect(halfTurnsWithin({ low: -2, high: 2 }, 0.5)).toEqual({ first: -1, last: 0 });
    const none = halfTurnsWithin({ low: 0.5, high: 1 }, 0);
    expect(none !== undefined && none.last < none.first).toBe(true);
  });

  it('gives up where doubles no longer count', () => {
    expect(halfTurnsWithin({ low: 1e16, high: 2e16 }, 0)).toBeUndefined();
    expect(halfTurnsWithin({ low: -Infinity, high: 0 }, 0)).toBeUndefined();
  });
});
