import { describe, expect, it } from 'vitest';
import { momentText } from './moment';

const now = new Date(2025, 11, 1, 14, 0);
const at = (...parts: [number, number, number, number?, number?]): string => new Date(...parts).toISOString();

describe('momentText', () => {
  it('says near days by name', () => {
    expect(momentText(at(2025, 11, 1, 9, 5), now)).toBe('Today 09:05');
    expect(momentText(at(2025, 10, 30, 23, 59), now)).toBe('Yesterday 23:59');
    expect(momentText(at(2025, 11, 2, 0, 1), now)).toBe('Tomorrow 00:01');
  });

  it('says other days by date, and the year only where it is another one', () => {
    expect(momentText(at(2025, 10, 26), now)).toBe('26 Nov');
    expect(momentText(at(2024, 10, 26), now)).toBe('26 Nov 2024');
  });
});
