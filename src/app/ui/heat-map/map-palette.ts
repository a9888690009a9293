import { rgb, type RGBColor } from 'd3';

/** The colours of a map as the page's theme has them now. */
export interface MapPalette {
  /** From the limit to twice the limit and beyond. */
  readonly holds: readonly RGBColor[];
  /** From the limit down. */
  readonly fails: readonly RGBColor[];
  readonly failHatch: string;
  readonly unknown: RGBColor;
  readonly unknownHatch: string;
  readonly limit: string;
  readonly contour: string;
}

/** The classes of the elements that carry the colours. */
export const PALETTE_CLASSES = [
  ...[1, 2, 3, 4, 5].map((place) => `holds-${place}`),
  ...[1, 2, 3].map((place) => `fails-${place}`),
  ...['fail-hatch', 'unknown', 'unknown-hatch', 'limit', 'contour'],
];

/**
 * Reads the colours from the elements that carry them: a custom property that depends on the theme is text until an
 * element uses it as a colour.
 */
export function readPalette(swatches: HTMLElement): MapPalette {
  const style = swatches.ownerDocument.defaultView;
  const colour = (name: string): string => {
    const element = swatches.querySelector(`.${name}`);
    return (element && style?.getComputedStyle(element).color) || 'rgb(0, 0, 0)';
  };
  return {
    holds: [1, 2, 3, 4, 5].map((place) => rgb(colour(`holds-${place}`))),
    fails: [1, 2, 3].map((place) => rgb(colour(`fails-${place}`))),
    failHatch: colour('fail-hatch'),
    unknown: rgb(colour('unknown')),
    unknownHatch: colour('unknown-hatch'),
    limit: colour('limit'),
    contour: colour('contour'),
  };
}

/**
 * Distance of a value from the limit in units of the limit: 1 is twice the limit, −1 is zero. A limit of 0 or less has
 * no multiples; there the unit is the farthest finite value, `reach`.
 */
export function distance(value: number, limit: number, reach: number): number {
  return (value - limit) / (limit > 0 ? limit : reach > 0 ? reach : 1);
}

/** Writes the colour at `distance` to four bytes. The ramps do not meet at the limit: a break is to be seen there. */
export function writeColour(bytes: Uint8ClampedArray, at: number, far: number, palette: MapPalette): void {
  const ramp = far < 0 ? palette.fails : palette.holds;
  const place = Math.min(1, Math.abs(far)) * (ramp.length - 1);
  const index = Math.min(ramp.length - 2, Math.floor(place));
  const share = place - index;
  const from = ramp[index];
  const to = ramp[index + 1];
  bytes[at] = from.r + share * (to.r - from.r);
  bytes[at + 1] = from.g + share * (to.g - from.g);
  bytes[at + 2] = from.b + share * (to.b - from.b);
  bytes[at + 3] = 255;
}
