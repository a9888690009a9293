/** One place where two studies differ; undefined where a side has nothing there. */
export interface StudyChange {
  readonly path: string;
  readonly before: string | undefined;
  readonly after: string | undefined;
}

/**
 * Where two studies differ, by path. Things in lists that have an `id` or a `name` are compared by it, so that an
 * inserted parameter is one change and not one for every parameter after it.
 */
export function studyChanges(before: unknown, after: unknown): StudyChange[] {
  return changesAt('', before, after);
}

function changesAt(path: string, before: unknown, after: unknown): StudyChange[] {
  const left = entriesOf(before);
  const right = entriesOf(after);
  if (left === undefined || right === undefined) {
    const [was, is] = [shown(before), shown(after)];
    return was === is ? [] : [{ path, before: was, after: is }];
  }
  const keys = [...new Set([...left.keys(), ...right.keys()])];
  return keys.flatMap((key) =>
    changesAt(path === '' ? key : `${path}.${key}`, left.get(key), right.get(key)),
  );
}

function entriesOf(value: unknown): Map<string, unknown> | undefined {
  if (Array.isArray(value)) {
    return new Map(value.map((entry: unknown, index) => [nameIn(entry) ?? String(index + 1), entry]));
  }
  return typeof value === 'object' && value !== null ? new Map(Object.entries(value)) : undefined;
}

function nameIn(entry: unknown): string | undefined {
  if (typeof entry !== 'object' || entry === null) return undefined;
  for (const key of ['id', 'name', 'measure'] as const) {
    const name = key in entry ? (entry as Record<string, unknown>)[key] : undefined;
    if (typeof name === 'string') return name;
  }
  return undefined;
}

function shown(value: unknown): string | undefined {
  if (value === undefined) return undefined;
  return typeof value === 'string' ? value : JSON.stringify(value);
}
