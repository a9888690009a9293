import { describe, expect, it } from 'vitest';
import { findUnit } from './find-unit';
import { spellings, units } from './table';

describe('findUnit', () => {
  it.each([
    ['N s/m', 'N·s/m'],
    ['N·s/m', 'N·s/m'],
    ['N⋅s / m', 'N·s/m'],
    ['Ns/m', 'N·s/m'],
    [' kg m² ', 'kg·m^2'],
    ['kg*m^2', 'kg·m^2'],
    ['N m s', 'N·m·s'],
    ['°', 'deg'],
    ['s⁻¹', '1/s'],
  ])('reads %j as %s', (spelling, label) => {
    expect(findUnit(spelling)?.label).toBe(label);
  });

  it('keeps a metre second apart from a millisecond', () => {
    expect(findUnit('ms')?.dimension).toBe('time');
    expect(findUnit('m s')).toBeUndefined();
  });

  it.each(['', 'furlong', 'KG', 'constructor', '__proto__', 'm'.repeat(1000)])(
    'does not know %j',
    (label) => {
      expect(findUnit(label)).toBeUndefined();
    },
  );

  it('gives every spelling to one unit only', () => {
    expect(new Set(spellings.map(([spelling]) => spelling)).size).toBe(spellings.length);
  });

  it('finds every unit by its own label', () => {
    for (const unit of units) expect(findUnit(unit.label)).toBe(unit);
  });
});
