/** As much of a schema of the contract as reading an answer needs. */
export interface Schema<T> {
  parse(value: unknown): T;
}

/** Lists come as `{ items }`. */
export function listOf<T>(item: Schema<T>): Schema<T[]> {
  return {
    parse(value) {
      if (typeof value !== 'object' || value === null || !('items' in value) || !Array.isArray(value.items)) {
        throw new TypeError('A list of items was expected.');
      }
      return value.items.map((entry) => item.parse(entry));
    },
  };
}
