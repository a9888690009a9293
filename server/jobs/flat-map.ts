import type { MapAnswer } from '../../shared/contracts';

/** A map as it is handed between threads and stored: doubles in a row, NaN where a cell is unknown. */
export interface FlatMap {
  /** Nodes of both axes, each in its parameter's unit. */
  readonly x: Float64Array;
  readonly y: Float64Array;
  readonly measure: MapAnswer['measure'];
  readonly others: NonNullable<MapAnswer['others']>;
  /** Row by row, row 0 at the first node of y. */
  readonly values: Float64Array;
}

export function flattenMap({ x, y, measure, others = 'nominal', values }: MapAnswer): FlatMap {
  const flat = new Float64Array(x.length * y.length);
  values.forEach((row, r) => row.forEach((value, c) => (flat[r * x.length + c] = value ?? NaN)));
  return { x: Float64Array.from(x), y: Float64Array.from(y), measure, others, values: flat };
}

/** One row of a flat map, as a result states it. */
export function mapRow({ x, values }: FlatMap, row: number): (number | null)[] {
  return Array.from(values.subarray(row * x.length, (row + 1) * x.length), (value) =>
    Number.isNaN(value) ? null : value,
  );
}
