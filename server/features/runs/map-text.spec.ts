import { describe, expect, it } from 'vitest';
import { mapText } from './map-text';

describe('mapText', () => {
  it('is the text of the map with unknown cells as null, however large it is', async () => {
    const [columns, rows] = [60, 90];
    const x = Float64Array.from({ length: columns }, (_, i) => i / 7);
    const y = Float64Array.from({ length: rows }, (_, i) => 1e5 + i / 3);
    const values = Float64Array.from({ length: columns * rows }, (_, i) => (i % 11 === 0 ? NaN : i / 13));
    const text = await mapText({ x, y, measure: 'closest', others: 'nominal', values });
    const expected = {
      x: [...x],
      y: [...y],
      measure: 'closest',
      values: Array.from({ length: rows }, (_, row) =>
        Array.from(values.slice(row * columns, (row + 1) * columns), (value) =>
          Number.isNaN(value) ? null : value,
        ),
      ),
    };
    expect(text).toBe(JSON.stringify(expected));
  });

  it('says that cells over the other bands are sampled', async () => {
    const node = Float64Array.of(1);
    const map = { x: node, y: node, measure: 'gainMargin', others: 'anywhere', values: node } as const;
    expect(JSON.parse(await mapText(map))).toEqual({
      ...{ x: [1], y: [1], measure: 'gainMargin', others: 'anywhere', proof: 'sampled', values: [[1]] },
    });
  });
});
