/** The largest number of values (numbers, texts, lists, objects, …) in a study. */
export const MOST_VALUES = 50_000;

/**
 * Whether a JSON value holds more than `limit` values, itself included. Every value may be a fault, and the schemas
 * pass lists of faults on as arguments, of which an engine takes only so many. Without recursion.
 */
export function exceedsValues(root: unknown, limit: number): boolean {
  const open: unknown[] = [root];
  let count = 0;
  while (open.length > 0) {
    const value = open.pop();
    count += 1;
    if (count + open.length > limit) return true;
    if (typeof value !== 'object' || value === null) continue;
    for (const entry of Object.values(value)) open.push(entry);
  }
  return false;
}
