import { expect, it } from 'vitest';
import { flattenMap, mapRow } from './flat-map';

it('flattenMap keeps every digit and which cells are unknown', () => {
  const values = [
    [0.1, null, -0],
    [5e-324, 1.7976931348623157e308, null],
  ];
  const flat = flattenMap({ x: [1, 2, 3], y: [0.1, 0.2], measure: 'closest', values });
  expect(flat).toMatchObject({ measure: 'closest', others: 'nominal' });
  expect([...flat.x]).toEqual([1, 2, 3]);
  expect([...flat.y]).toEqual([0.1, 0.2]);
  expect([mapRow(flat, 0), mapRow(flat, 1)]).toEqual(values);
});
