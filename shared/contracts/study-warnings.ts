import { findUnit } from '../units';
import type { Warning } from './fault';
import { formatPath, type PathPart } from './path';
import { quoted } from './quoted';
import type { Study } from './study';

/** What a person should know about a usable study: unknown units, one-sided bands, keys without effect. */
export function studyWarnings(study: Study): Warning[] {
  const warnings: Warning[] = [];
  const warn = (path: readonly PathPart[], message: string) =>
    warnings.push({ path: formatPath(path), message });

  study.parameters.forEach(({ unit, low, high }, index) => {
    if (unit !== undefined && unit.trim() !== '' && findUnit(unit) === undefined) {
      warn(
        ['parameters', index, 'unit'],
        `unknown unit ${quoted(unit)}, taken as a label; the values are read as SI`,
      );
    }
    if (low === undefined && high !== undefined)
      warn(['parameters', index, 'low'], 'left out; the band starts at the nominal');
    if (low !== undefined && high === undefined)
      warn(['parameters', index, 'high'], 'left out; the band ends at the nominal');
  });
  if (study.payload === undefined) {
    for (const key of ['searchUpTo', 'searchDownTo', 'rating'] as const) {
      if (study[key] !== undefined) warn([key], 'has no effect without a payload');
    }
  }
  return warnings;
}
