import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { toSi } from './convert';
import { findUnit } from './find-unit';
import { formatProved } from './format-proved';
import { units } from './table';

describe('formatProved', () => {
  it.each([
    [571.26, 'down', '571.2'],
    [571.26, 'up', '571.3'],
    [600, 'down', '600'],
    [99999, 'down', '99990'],
    [99999, 'up', '100000'],
    [0.00123456, 'down', '0.001234'],
    [-1.23456, 'down', '-1.235'],
    [0, 'down', '0'],
  ] as const)('%d rounded %s is %s', (value, side, text) => {
    expect(formatProved(value, { side })).toBe(text);
  });

  it('keeps a typed value as it was typed', () => {
    const unit = findUnit('lb');
    if (unit === undefined) throw new Error('no pound');
    expect(formatProved(toSi(1060, unit), { side: 'down', unit })).toBe('1060');
    expect(formatProved(toSi(1060, unit), { side: 'up', unit })).toBe('1060');
  });

  it('never shows more than was proved, rounded and converted', () => {
    fc.assert(
      fc.property(
        fc.double({ min: -1e9, max: 1e9, noNaN: true }).filter((x) => Math.abs(x) > 1e-12),
        fc.option(fc.constantFrom(...units), { nil: undefined }),
        fc.integer({ min: 1, max: 9 }),
        (value, unit, significant) => {
          const inSi = (text: string) => (unit === undefined ? Number(text) : toSi(Number(text), unit));
          const format = unit === undefined ? { significant } : { significant, unit };
          expect(inSi(formatProved(value, { side: 'down', ...format }))).toBeLessThanOrEqual(value);
          expect(inSi(formatProved(value, { side: 'up', ...format }))).toBeGreaterThanOrEqual(value);
        },
      ),
      { numRuns: 2000 },
    );
  });

  it('refuses a value that is not finite', () => {
    expect(() => formatProved(NaN, { side: 'down' })).toThrow(RangeError);
    expect(() => formatProved(1, { side: 'down', significant: 0 })).toThrow(RangeError);
  });
});
