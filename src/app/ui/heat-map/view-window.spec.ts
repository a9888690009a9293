import { describe, expect, it } from 'vitest';
import { panWindow, zoomWindow } from './view-window';

const WHOLE = { xLow: 0, xHigh: 800, yLow: 100, yHigh: 300 };

describe('zoomWindow', () => {
  it('keeps the point under the hand where it is', () => {
    expect(zoomWindow(WHOLE, WHOLE, 2, { x: 200, y: 150 })).toEqual({
      xLow: 100,
      xHigh: 500,
      yLow: 125,
      yHigh: 225,
    });
  });

  it('ends in the whole map', () => {
    const close = { xLow: 100, xHigh: 500, yLow: 125, yHigh: 225 };
    expect(zoomWindow(close, WHOLE, 0.5, { x: 200, y: 150 })).toBeUndefined();
    expect(zoomWindow(WHOLE, WHOLE, 0.5, { x: 200, y: 150 })).toBeUndefined();
  });

  it('does not leave the map when it grows again', () => {
    const corner = { xLow: 0, xHigh: 200, yLow: 250, yHigh: 300 };
    expect(zoomWindow(corner, WHOLE, 0.5, { x: 200, y: 250 })).toEqual({
      xLow: 0,
      xHigh: 400,
      yLow: 200,
      yHigh: 300,
    });
  });

  it('goes no closer than a fortieth', () => {
    const closest = zoomWindow(WHOLE, WHOLE, 1e6, { x: 400, y: 200 });
    expect(closest).toEqual({ xLow: 390, xHigh: 410, yLow: 197.5, yHigh: 202.5 });
  });
});

describe('panWindow', () => {
  it('moves within the map', () => {
    const window = { xLow: 100, xHigh: 500, yLow: 125, yHigh: 225 };
    expect(panWindow(window, WHOLE, { x: 50, y: -10 })).toEqual({
      xLow: 150,
      xHigh: 550,
      yLow: 115,
      yHigh: 215,
    });
    expect(panWindow(window, WHOLE, { x: 1e9, y: -1e9 })).toEqual({
      xLow: 400,
      xHigh: 800,
      yLow: 100,
      yHigh: 200,
    });
  });
});
