import type { Warning } from './fault';
import { formatPath, type PathPart } from './path';

/**
 * A warning for every key of `given` that reading it left out of `read`: the schemas keep exactly the keys they know.
 */
export function unknownKeys(given: unknown, read: unknown, path: readonly PathPart[] = []): Warning[] {
  if (Array.isArray(given) && Array.isArray(read)) {
    return given.flatMap((entry, index) => unknownKeys(entry, read[index], [...path, index]));
  }
  if (!isObject(given) || !isObject(read)) return [];
  return Object.keys(given).flatMap((key) => {
    const at = [...path, key];
    return Object.hasOwn(read, key)
      ? unknownKeys(given[key], read[key], at)
      : [{ path: formatPath(at), message: 'unknown key, ignored' }];
  });
}

function isObject(value: unknown): value is Record<string, unknown> {
  return typeof value === 'object' && value !== null && !Array.isArray(value);
}
