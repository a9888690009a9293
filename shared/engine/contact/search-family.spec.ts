import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  bandsFamily,
  payloadFamily,
  type SearchFamily,
  type SearchVariable,
  sliceFamily,
  stretchFamily,
} from './search-family';

const free = { minimum: -Infinity, maximum: Infinity };
const payload: SearchVariable = {
  nominal: 300,
  low: 40,
  high: 480,
  minimum: 0,
  maximum: Infinity,
  stretches: true,
};
const variables: SearchVariable[] = [
  payload,
  { nominal: 10, low: 7, high: 15, ...free, stretches: true },
  { nominal: 2, low: 2, high: 3, minimum: 0, maximum: 5, stretches: true },
  { nominal: 1, low: 0.5, high: 4, ...free, stretches: false },
];

const coordinate = fc.double({ min: -1, max: 1, noNaN: true });
const place = fc.tuple(
  fc.double({ min: 0, max: 1, noNaN: true }),
  fc.array(coordinate, { minLength: variables.length, maxLength: variables.length }),
);

const families: [string, SearchFamily][] = [
  ['payload upwards', payloadFamily(variables, 0, 2400)],
  ['payload downwards', payloadFamily(variables, 0, 0)],
  ['stretch', stretchFamily(variables, 10)],
  ['bands', bandsFamily(variables)],
  ['slice', sliceFamily(variables, 0)],
];

describe.each(families)('family: %s', (_, family) => {
  it('holds every placed point in the box of its objective, and never overstates the objective', () => {
    fc.assert(
      fc.property(place, ([share, coordinates]) => {
        const objective = share * family.reach;
        const point = new Float64Array(variables.length);
        family.placePoint(objective, coordinates, point);
        family.rangesAt(objective).forEach(({ low, high }, i) => {
          expect(point[i]).toBeGreaterThanOrEqual(low);
          expect(point[i]).toBeLessThanOrEqual(high);
        });
        expect(family.objectiveOf(point)).toBeLessThanOrEqual(objective * (1 + 1e-12) + 1e-12);
        expect(family.objectiveBound(point, point)).toBeCloseTo(family.objectiveOf(point), 9);
      }),
    );
  });

  it('bounds the objective of a box from below', () => {
    fc.assert(
      fc.property(place, place, ([first, a], [second, b]) => {
        const p = new Float64Array(variables.length);
        const q = new Float64Array(variables.length);
        family.placePoint(first * family.reach, a, p);
        family.placePoint(second * family.reach, b, q);
        const bound = family.objectiveBound(
          p.map((value, i) => Math.min(value, q[i])),
          p.map((value, i) => Math.max(value, q[i])),
        );
        expect(bound).toBeLessThanOrEqual(family.objectiveOf(p) + 1e-9);
        expect(bound).toBeLessThanOrEqual(family.objectiveOf(q) + 1e-9);
      }),
    );
  });

  it('finds the coordinates of a point again', () => {
    fc.assert(
      fc.property(place, ([share, coordinates]) => {
        const point = new Float64Array(variables.length);
        const again = new Float64Array(variables.length);
        family.placePoint(share * family.reach, coordinates, point);
        const found = new Float64Array(variables.length);
        family.coordinatesOf(point, found);
        family.placePoint(family.objectiveOf(point), found, again);
        again.forEach((value, i) => expect(value).toBeCloseTo(point[i], 6));
      }),
    );
  });
});

describe('ends of the families', () => {
  it('moves the payload to the searched end exactly', () => {
    const family = payloadFamily(variables, 0, 2400.7);
    expect(family.rangesAt(family.reach)[0]).toEqual({ low: 300, high: 2400.7 });
    expect(payloadFamily(variables, 0, 0).rangesAt(300)[0]).toEqual({ low: 0, high: 300 });
  });

  it('stretches to the bands themselves at factor 1, within physical ends beyond it', () => {
    const family = stretchFamily(variables, 10);
    expect(family.rangesAt(1)).toEqual(variables.map(({ low, high }) => ({ low, high })));
    const wide = family.rangesAt(10);
    expect(wide[0].low).toBe(0);
    expect(wide[2]).toEqual({ low: 2, high: 5 });
    expect(wide[3]).toEqual({ low: 0.5, high: 4 });
  });
});
