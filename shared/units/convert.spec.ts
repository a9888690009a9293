import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { fromSi, fromSiDown, fromSiUp, toSi } from './convert';
import { findUnit } from './find-unit';
import { units } from './table';
import type { Unit } from './unit';

function unit(label: string): Unit {
  const found = findUnit(label);
  if (found === undefined) throw new Error(`no unit ${label}`);
  return found;
}

const anyUnit = fc.constantFrom(...units);
const magnitude = fc.double({ min: 1e-9, max: 1e9, noNaN: true });
const value = fc.oneof(
  magnitude,
  magnitude.map((x) => -x),
  fc.constant(0),
);

describe('toSi', () => {
  it.each([
    ['lb', 1, 0.45359237],
    ['in', 1, 0.0254],
    ['ft', 1, 0.3048],
    ['t', 2.5, 2500],
    ['ms', 8, 0.008],
    ['mm', 35, 0.035],
    ['N/mm', 150, 150000],
    ['kN/m', 150, 150000],
    ['km/h', 36, 10],
    ['%', 12.5, 0.125],
    ['kN s/m', 0.62, 620],
    ['rad/s', 3, 3],
    ['Hz', 1, 2 * Math.PI],
    ['deg', 180, Math.PI],
    ['rpm', 1, Math.PI / 30],
  ])('one of %s: %d is %d', (label, given, si) => {
    expect(toSi(given, unit(label))).toBe(si);
  });

  it('agrees with the definition of the pound-force to the last places', () => {
    expect(toSi(1, unit('lbf'))).toBe(4.4482216152605);
    expect(Math.abs(toSi(1, unit('lbf/in')) / ((0.45359237 * 9.80665) / 0.0254) - 1)).toBeLessThan(1e-15);
    expect(Math.abs(toSi(1, unit('lb in^2')) / (0.45359237 * 0.0254 * 0.0254) - 1)).toBeLessThan(1e-15);
  });

  it('is the identity in SI base units', () => {
    for (const label of [
      'm',
      'kg',
      's',
      'rad',
      'N',
      'N/m',
      'N s/m',
      'N m',
      'N m/rad',
      'N m s',
      'kg m^2',
      'm/s',
      '1/s',
      'rad/s',
    ]) {
      expect(unit(label).factor).toBe(1);
    }
  });
});

describe('fromSi', () => {
  it('gives back what was typed', () => {
    fc.assert(
      fc.property(
        anyUnit,
        fc.integer({ min: -1000000, max: 1000000 }),
        fc.integer({ min: 0, max: 5 }),
        (of, digits, places) => {
          const typed = Number(`${digits}e-${places}`);
          expect(fromSi(toSi(typed, of), of)).toBe(typed === 0 ? fromSi(0, of) : typed);
        },
      ),
    );
  });

  it('never leaves the safe side', () => {
    fc.assert(
      fc.property(anyUnit, value, (of, si) => {
        const down = fromSiDown(si, of);
        const up = fromSiUp(si, of);
        expect(toSi(down, of)).toBeLessThanOrEqual(si);
        expect(toSi(up, of)).toBeGreaterThanOrEqual(si);
        expect(Math.abs(down - up)).toBeLessThanOrEqual(Math.abs(si / of.factor) * 2e-15);
      }),
      { numRuns: 1000 },
    );
  });
});
