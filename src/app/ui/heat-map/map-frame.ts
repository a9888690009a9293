import { scaleLinear, type ScaleLinear } from 'd3';
import type { MapPoint, MapWindow } from './map-grid';
import { tickText } from './tick-text';

/** Room about the plot, CSS pixels. */
export const FRAME_TOP = 8;
export const FRAME_BOTTOM = 26;
const RIGHT = 14;
const LEFT_AT_LEAST = 32;
const TICK_AND_GAP = 14;
/** Widest figure of the text at 12 pixels. */
const DIGIT = 6.6;

export interface MapFrame {
  readonly width: number;
  readonly left: number;
  readonly plotWidth: number;
  readonly plotHeight: number;
}

export interface MapScales {
  readonly x: ScaleLinear<number, number>;
  readonly y: ScaleLinear<number, number>;
}

/** Wide frames are flat as a landscape, narrow ones nearly square; the longest label of the upright axis has room. */
export function frameOf(width: number, { yLow, yHigh }: MapWindow): MapFrame {
  const room = width - RIGHT;
  const plotHeight = Math.round(Math.max(Math.min(300, room), Math.min(640, 0.57 * room)));
  const count = yTickCount(plotHeight);
  const scale = scaleLinear([yLow, yHigh], [plotHeight, 0]);
  const format = scale.tickFormat(count);
  const longest = Math.max(0, ...scale.ticks(count).map((value) => tickText(format(value)).length));
  const left = Math.round(Math.max(LEFT_AT_LEAST, TICK_AND_GAP + DIGIT * longest));
  return { width, left, plotWidth: Math.max(80, room - left), plotHeight };
}

export function scalesOf({ plotWidth, plotHeight }: MapFrame, window: MapWindow): MapScales {
  return {
    x: scaleLinear([window.xLow, window.xHigh], [0, plotWidth]),
    y: scaleLinear([window.yLow, window.yHigh], [plotHeight, 0]),
  };
}

export function xTickCount(width: number): number {
  return Math.max(2, Math.min(10, Math.floor(width / 66)));
}

export function yTickCount(height: number): number {
  return Math.max(2, Math.min(10, Math.floor(height / 42)));
}

export function isWithin({ x, y }: MapPoint, { xLow, xHigh, yLow, yHigh }: MapWindow): boolean {
  return x >= xLow && x <= xHigh && y >= yLow && y <= yHigh;
}

export function middleOf({ xLow, xHigh, yLow, yHigh }: MapWindow): MapPoint {
  return { x: (xLow + xHigh) / 2, y: (yLow + yHigh) / 2 };
}

const LED_BY: Readonly<Record<string, readonly [number, number]>> = {
  ArrowLeft: [-1, 0],
  ArrowRight: [1, 0],
  ArrowDown: [0, -1],
  ArrowUp: [0, 1],
};

/** The point that an arrow key leads to: a hundredth of what is seen, with Shift a tenth; undefined for other keys. */
export function ledPoint(
  { key, shiftKey }: { readonly key: string; readonly shiftKey: boolean },
  from: MapPoint,
  window: MapWindow,
): MapPoint | undefined {
  const by = LED_BY[key];
  if (by === undefined) return undefined;
  const share = shiftKey ? 0.1 : 0.01;
  const x = from.x + by[0] * share * (window.xHigh - window.xLow);
  const y = from.y + by[1] * share * (window.yHigh - window.yLow);
  return {
    x: Math.max(window.xLow, Math.min(window.xHigh, x)),
    y: Math.max(window.yLow, Math.min(window.yHigh, y)),
  };
}
