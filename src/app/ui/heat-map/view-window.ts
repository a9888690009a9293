import type { MapPoint, MapWindow } from './map-grid';

/** The closest view shows this share of the map. */
const CLOSEST = 1 / 40;

/**
 * The window seen `factor` times as close about a point that stays where it is, held within the map; undefined where
 * that is the whole map.
 */
export function zoomWindow(
  window: MapWindow,
  whole: MapWindow,
  factor: number,
  about: MapPoint,
): MapWindow | undefined {
  const share = Math.min(
    1,
    Math.max(CLOSEST, (window.xHigh - window.xLow) / (whole.xHigh - whole.xLow) / factor),
  );
  if (share > 1 - 1e-9) return undefined;
  const width = share * (whole.xHigh - whole.xLow);
  const height = share * (whole.yHigh - whole.yLow);
  const xLow = about.x - (width * (about.x - window.xLow)) / (window.xHigh - window.xLow);
  const yLow = about.y - (height * (about.y - window.yLow)) / (window.yHigh - window.yLow);
  return placed(xLow, yLow, width, height, whole);
}

/** The window moved by so much, held within the map. */
export function panWindow(window: MapWindow, whole: MapWindow, by: MapPoint): MapWindow {
  const width = window.xHigh - window.xLow;
  const height = window.yHigh - window.yLow;
  return placed(window.xLow + by.x, window.yLow + by.y, width, height, whole);
}

function placed(xLow: number, yLow: number, width: number, height: number, whole: MapWindow): MapWindow {
  const x = Math.max(whole.xLow, Math.min(whole.xHigh - width, xLow));
  const y = Math.max(whole.yLow, Math.min(whole.yHigh - height, yLow));
  return { xLow: x, xHigh: x + width, yLow: y, yHigh: y + height };
}
