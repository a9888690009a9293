import { describe, expect, it } from 'vitest';
import { readFigure } from './read-figure';

const read = (text: string, range = { minimum: -1000, maximum: 10_000 }) =>
  readFigure(text, 'kg', range, (value) => `${value} kg`);

describe('readFigure', () => {
  it('reads what people type', () => {
    const typed = ['480', ' 480 kg', '480,5', '.5', '1e3', '\u221212', '1\u2009200 kg'];
    expect(typed.map((text) => read(text))).toEqual(
      [480, 480, 480.5, 0.5, 1000, -12, 1200].map((value) => ({ value })),
    );
  });

  it('does not guess what a comma before three digits means', () => {
    expect(read('1,250')).toEqual({ fault: 'could be read in two ways: write 1250 or 1.250' });
    expect(read('0,250')).toEqual({ value: 0.25 });
  });

  it.each(['', '  ', 'kg'])('needs a number in %j', (text) => {
    expect(read(text)).toEqual({ fault: 'needs a number' });
  });

  it.each(['12a', '1.2.3', '1,2,3', '0x10', '12 m', '--3'])('refuses %j', (text) => {
    expect(read(text)).toEqual({ fault: 'needs a number, such as 12.5' });
  });

  it('names the end that was passed', () => {
    expect(read('-1', { minimum: 0, maximum: 300 })).toEqual({ fault: 'must not be below 0 kg' });
    expect(read('301', { minimum: 0, maximum: 300 })).toEqual({ fault: 'must not be above 300 kg' });
  });
});
