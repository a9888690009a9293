import { describe, expect, it } from 'vitest';
import { tickText } from './tick-text';

describe('tickText', () => {
  it('writes figures as the rest of the page does', () => {
    expect(['1,200', '12,000', '-0.5', '0.25'].map(tickText)).toEqual([
      '1200',
      '12\u2009000',
      '\u22120.5',
      '0.25',
    ]);
  });
});
