/** Values at the nodes of a grid, evenly spaced with both ends; `values[row][column]`, row 0 at the lowest y. */
export interface MapGrid {
  readonly x: readonly number[];
  readonly y: readonly number[];
  /** null where there is no value: drawn as unknown. */
  readonly values: readonly (readonly (number | null)[])[];
}

export interface MapPoint {
  readonly x: number;
  readonly y: number;
}

export interface AxisText {
  readonly label: string;
  readonly unit: string;
}

/** A band of each axis; an end that is null is open and has no handle. */
export interface BandRectangle {
  readonly xLow: number | null;
  readonly xHigh: number | null;
  readonly yLow: number | null;
  readonly yHigh: number | null;
}

export type BandEdge = keyof BandRectangle;

export interface BandChange {
  readonly edge: BandEdge;
  readonly value: number;
  /** False while the hand is still at it. */
  readonly final: boolean;
}

/** A part of the plane, ends included. */
export interface MapWindow {
  readonly xLow: number;
  readonly xHigh: number;
  readonly yLow: number;
  readonly yHigh: number;
}

export function extentOf({ x, y }: MapGrid): MapWindow {
  return { xLow: x[0], xHigh: x[x.length - 1], yLow: y[0], yHigh: y[y.length - 1] };
}

export function sameWindow(a: MapWindow | undefined, b: MapWindow | undefined): boolean {
  return (
    a === b ||
    (a !== undefined &&
      b !== undefined &&
      a.xLow === b.xLow &&
      a.xHigh === b.xHigh &&
      a.yLow === b.yLow &&
      a.yHigh === b.yHigh)
  );
}

export interface CellCounts {
  readonly all: number;
  readonly failing: number;
  readonly unknown: number;
}

/** How many cells fail (lie below the limit) and how many have no value. */
export function countCells({ values }: MapGrid, limit: number): CellCounts {
  let all = 0;
  let failing = 0;
  let unknown = 0;
  for (const row of values) {
    for (const value of row) {
      all++;
      if (!isKnown(value)) unknown++;
      else if (value < limit) failing++;
    }
  }
  return { all, failing, unknown };
}

export function isKnown(value: number | null | undefined): value is number {
  return typeof value === 'number' && Number.isFinite(value);
}
