import { isKnown, type MapGrid } from './map-grid';

/**
 * The lines on which the map has the value `level`, by marching squares with linear interpolation (Lorensen and Cline
 * 1987, in the plane). Flat: x0, y0, x1, y1 of one piece after another, counted in columns and rows from the first
 * node.
 *
 * A square with a node of no value has no line: where the map is unknown, so is its contour. Polygons of a contour
 * package close around such nodes and along the border, and would draw a limit where none was found. A saddle is
 * split by the mean of its corners.
 */
export function contourLines({ values }: MapGrid, level: number): number[] {
  const lines: number[] = [];
  for (let row = 0; row + 1 < values.length; row++) {
    const below = values[row];
    const above = values[row + 1];
    for (let column = 0; column + 1 < below.length; column++) {
      const a = below[column];
      const b = below[column + 1];
      const c = above[column + 1];
      const d = above[column];
      if (!isKnown(a) || !isKnown(b) || !isKnown(c) || !isKnown(d)) continue;
      const inside =
        (a >= level ? 1 : 0) | (b >= level ? 2 : 0) | (c >= level ? 4 : 0) | (d >= level ? 8 : 0);
      if (inside === 0 || inside === 15) continue;
      const bottom = [column + share(a, b, level), row] as const;
      const right = [column + 1, row + share(b, c, level)] as const;
      const top = [column + share(d, c, level), row + 1] as const;
      const left = [column, row + share(a, d, level)] as const;
      const meanInside = (a + b + c + d) / 4 >= level;
      // The side of the squares that a corner is cut off at, by the set of corners inside.
      const either = inside < 8 ? inside : 15 - inside;
      if (either === 5) {
        const cutsBAndD = (inside === 5) === meanInside;
        if (cutsBAndD) lines.push(...bottom, ...right, ...top, ...left);
        else lines.push(...left, ...bottom, ...right, ...top);
      } else if (either === 1) lines.push(...left, ...bottom);
      else if (either === 2) lines.push(...bottom, ...right);
      else if (either === 3) lines.push(...left, ...right);
      else if (either === 4) lines.push(...right, ...top);
      else if (either === 6) lines.push(...bottom, ...top);
      else lines.push(...left, ...top);
    }
  }
  return lines;
}

/** How far along from one node to the next the level lies; the ends have it on either side of them. */
function share(from: number, to: number, level: number): number {
  return to === from ? 0.5 : Math.max(0, Math.min(1, (level - from) / (to - from)));
}
