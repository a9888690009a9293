import { rgb } from 'd3';
import { describe, expect, it } from 'vitest';
import { distance, writeColour, type MapPalette } from './map-palette';

const PALETTE: MapPalette = {
  holds: [rgb(0, 0, 0), rgb(40, 0, 0), rgb(80, 0, 0), rgb(120, 0, 0), rgb(160, 0, 0)],
  fails: [rgb(0, 0, 100), rgb(0, 0, 150), rgb(0, 0, 200)],
  failHatch: '',
  unknown: rgb(9, 9, 9),
  unknownHatch: '',
  limit: '',
  contour: '',
};

function colour(far: number): number[] {
  const bytes = new Uint8ClampedArray(4);
  writeColour(bytes, 0, far, PALETTE);
  return [...bytes];
}

describe('distance', () => {
  it('counts in limits', () => {
    expect([0, 0.5, 1, 2].map((value) => distance(value, 0.5, 9))).toEqual([-1, 0, 1, 3]);
  });

  it('counts in the reach of the map where the limit is 0', () => {
    expect([-4, 0, 4].map((value) => distance(value, 0, 8))).toEqual([-0.5, 0, 0.5]);
    expect(distance(3, 0, 0)).toBe(3);
  });
});

describe('writeColour', () => {
  it('breaks at the limit', () => {
    expect(colour(0)).toEqual([0, 0, 0, 255]);
    expect(colour(-1e-9)).toEqual([0, 0, 100, 255]);
  });

  it('runs to twice the limit and stays there', () => {
    expect([0.125, 0.5, 1, 7].map((far) => colour(far)[0])).toEqual([20, 80, 160, 160]);
    expect([-0.25, -1, -30].map((far) => colour(far)[2])).toEqual([125, 200, 200]);
  });
});
