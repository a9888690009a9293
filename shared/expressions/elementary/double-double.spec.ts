import { describe, expect, it } from 'vitest';
import { productError, sumError } from './double-double';
import { binaryValue } from './testing/fixed-point-oracle';
import { seededArguments } from './testing/seeded-arguments';

/** x·2^1200, exact for the sizes used here. */
function scaled(x: number): bigint {
  const { mantissa, exponent } = binaryValue(x);
  return mantissa << BigInt(exponent + 1200);
}

describe('error terms', () => {
  const draw = seededArguments(111);

  it('make sums exact', () => {
    for (let i = 0; i < 2000; i += 1) {
      const a = draw.spread(-40, 40);
      const b = draw.spread(-40, 40);
      const sum = a + b;
      expect(scaled(sum) + scaled(sumError(a, b, sum))).toBe(scaled(a) + scaled(b));
    }
  });

  it('make products exact', () => {
    for (let i = 0; i < 2000; i += 1) {
      const a = draw.spread(-200, 200);
      const b = draw.spread(-200, 200);
      const product = a * b;
      const exact = (scaled(a) * scaled(b)) >> 1200n;
      expect(scaled(product) + scaled(productError(a, b, product))).toBe(exact);
    }
  });
});
