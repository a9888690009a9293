import { clamped, roundStep, withUnit } from '../band-handle';
import type { AxisText, BandEdge, BandRectangle, MapPoint, MapWindow } from './map-grid';

/** One edge of the band with all that its handle needs. */
export interface EdgeHandle {
  readonly edge: BandEdge;
  readonly along: 'x' | 'y';
  readonly side: 'low' | 'high';
  readonly value: number;
  readonly label: string;
  readonly valueText: string;
  readonly minimum: number;
  readonly maximum: number;
  readonly step: number;
  /** Where the handle stands: on its edge, in the middle of what is seen of it. */
  readonly at: MapPoint;
}

const EDGES = [
  { edge: 'xLow', along: 'x', side: 'low' },
  { edge: 'xHigh', along: 'x', side: 'high' },
  { edge: 'yLow', along: 'y', side: 'low' },
  { edge: 'yHigh', along: 'y', side: 'high' },
] as const;

/**
 * Handles of the edges that are seen in the window. An edge moves within the map and up to the nominal, or up to its
 * opposite where there is no nominal; an edge beyond the map can only be moved towards it.
 */
export function edgeHandles(
  band: BandRectangle,
  nominal: MapPoint | undefined,
  whole: MapWindow,
  window: MapWindow,
  axes: { readonly x: AxisText; readonly y: AxisText },
): EdgeHandle[] {
  const seen = seenPart(band, window);
  if (seen === undefined) return [];
  const middle = { x: (seen.xLow + seen.xHigh) / 2, y: (seen.yLow + seen.yHigh) / 2 };
  return EDGES.flatMap(({ edge, along, side }): EdgeHandle[] => {
    const value = band[edge];
    const low = along === 'x' ? 'xLow' : 'yLow';
    const high = along === 'x' ? 'xHigh' : 'yHigh';
    if (value === null || value < window[low] || value > window[high]) return [];
    const inner =
      nominal?.[along] ?? band[side === 'low' ? high : low] ?? (side === 'low' ? Infinity : -Infinity);
    const bound = clamped(inner, whole[low], whole[high]);
    const { label, unit } = axes[along];
    return [
      {
        edge,
        along,
        side,
        value,
        label: `${label.charAt(0).toUpperCase()}${label.slice(1)}, ${side} end`,
        valueText: withUnit(value, unit),
        minimum: side === 'low' ? whole[low] : Math.min(bound, value),
        maximum: side === 'low' ? Math.max(bound, value) : whole[high],
        step: roundStep((window[high] - window[low]) / 100),
        at: { ...middle, [along]: value },
      },
    ];
  });
}

/** The part of the band within the window; undefined where none is seen. Open ends reach to the window's edge. */
export function seenPart(band: BandRectangle, window: MapWindow): MapWindow | undefined {
  const part = {
    xLow: Math.max(window.xLow, band.xLow ?? -Infinity),
    xHigh: Math.min(window.xHigh, band.xHigh ?? Infinity),
    yLow: Math.max(window.yLow, band.yLow ?? -Infinity),
    yHigh: Math.min(window.yHigh, band.yHigh ?? Infinity),
  };
  return part.xLow <= part.xHigh && part.yLow <= part.yHigh ? part : undefined;
}
