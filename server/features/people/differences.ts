/** What a change makes of a thing: of each field that it alters, the value before and after. */
export function differences<T extends object>(
  before: T,
  after: T,
): Partial<Record<keyof T, { from: unknown; to: unknown }>> {
  const changed: Partial<Record<keyof T, { from: unknown; to: unknown }>> = {};
  for (const key in after) {
    if (after[key] !== before[key]) changed[key] = { from: before[key], to: after[key] };
  }
  return changed;
}
