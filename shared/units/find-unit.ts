import { spellings } from './table';
import type { Unit } from './unit';

const bySpelling = new Map<string, Unit>(spellings);

/**
 * Normal form of a unit's spelling: one `·` for any product sign or space between symbols, `^2` for ², no space around
 * a slash. The separator stays, because `m s` (metre second) and `ms` (millisecond) are different units.
 */
function normalSpelling(label: string): string {
  return label
    .trim()
    .replace(/²/g, '^2')
    .replace(/⁻¹/g, '^-1')
    .replace(/\s*\/\s*/g, '/')
    .replace(/\s*[·⋅*]\s*|\s+/g, '·');
}

/** The unit of the table with this label, in any accepted spelling; undefined where the label is only a label. */
export function findUnit(label: string): Unit | undefined {
  return label.length > 40 ? undefined : bySpelling.get(normalSpelling(label));
}
