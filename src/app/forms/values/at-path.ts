import type { PathPart, Study } from '../../../../shared/contracts';

type Branch = Readonly<Record<PathPart, unknown>>;

function isBranch(value: unknown): value is Branch {
  return typeof value === 'object' && value !== null;
}

/** The value at a path; undefined where the study does not go so far. */
export function valueAt(study: Study, path: readonly PathPart[]): unknown {
  return path.reduce<unknown>(
    (value, part) => (isBranch(value) && Object.hasOwn(value, part) ? value[part] : undefined),
    study,
  );
}

/**
 * A new study with the value at the path; undefined takes the key away, an item of a list with the place it had. What the
 * path does not touch stays the same object.
 */
export function withValueAt(study: Study, path: readonly PathPart[], value: unknown): Study {
  return placed(study, path, value) as Study;
}

function placed(at: unknown, [part, ...rest]: readonly PathPart[], value: unknown): unknown {
  if (Array.isArray(at)) {
    const items: readonly unknown[] = at;
    if (rest.length === 0 && value === undefined) return items.filter((_, index) => index !== part);
    const item = rest.length === 0 ? value : placed(items[part as number], rest, value);
    return Object.assign([...items], { [part]: item });
  }
  const branch = isBranch(at) ? at : {};
  if (rest.length === 0 && value === undefined) {
    return Object.fromEntries(Object.entries(branch).filter(([key]) => key !== part));
  }
  return { ...branch, [part]: rest.length === 0 ? value : placed(branch[part], rest, value) };
}
