/** Order of a table by one column, as it stands in the URL: `reserve` rising, `-reserve` falling. */
export interface SortOrder {
  readonly column: string;
  readonly falling: boolean;
}

export function readSortOrder(text: string | null | undefined, fallback: SortOrder): SortOrder {
  if (text === null || text === undefined || text === '') return fallback;
  return text.startsWith('-') ? { column: text.slice(1), falling: true } : { column: text, falling: false };
}

export function writeSortOrder({ column, falling }: SortOrder): string {
  return falling ? `-${column}` : column;
}

/** Sorted copy; equal rows keep their order, and rows without a value come last either way. */
export function sortRows<Row>(
  rows: readonly Row[],
  valueOf: (row: Row) => string | number | undefined,
  falling: boolean,
): Row[] {
  const sign = falling ? -1 : 1;
  return rows
    .map((row) => ({ row, value: valueOf(row) }))
    .sort((a, b) => {
      if (a.value === undefined || b.value === undefined) {
        return a.value === b.value ? 0 : a.value === undefined ? 1 : -1;
      }
      const order =
        typeof a.value === 'number' && typeof b.value === 'number'
          ? a.value - b.value
          : String(a.value).localeCompare(String(b.value), 'en', { numeric: true });
      return sign * order;
    })
    .map(({ row }) => row);
}
