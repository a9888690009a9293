import { canonicalJson, DEEPEST_NESTING } from '../../../shared/contracts';
import { studyUnusable } from '../../platform/problem';

/**
 * The text of a draft. A draft need not be a usable study: a form that is half filled in is kept as well, or a
 * reload would lose it.
 *
 * @throws Problem study-unusable for what is no object, or is nested deeper than any study may be
 */
export function draftContent(value: unknown): string {
  if (typeof value !== 'object' || value === null || Array.isArray(value)) {
    throw studyUnusable([{ path: 'study', message: 'must be an object' }]);
  }
  if (isDeeperThan(value, DEEPEST_NESTING)) {
    const message = `must not be nested deeper than ${DEEPEST_NESTING}`;
    throw studyUnusable([{ path: 'study', message }]);
  }
  return canonicalJson(value);
}

/** Level by level instead of by recursion, which such a value could exhaust. */
function isDeeperThan(root: object, limit: number): boolean {
  let level: object[] = [root];
  for (let depth = 1; level.length > 0; depth++) {
    if (depth > limit) return true;
    level = level.flatMap((container) =>
      Object.values(container).filter(
        (entry): entry is object => typeof entry === 'object' && entry !== null,
      ),
    );
  }
  return false;
}
