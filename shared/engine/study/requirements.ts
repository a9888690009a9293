import { requirementLevelFault, type PathPart, type Requirement } from '../../contracts';
import type { ComposedRequirement } from './composed-study';
import type { ExactValues } from './exact-values';
import type { FaultList } from './fault-list';

const MARGINS: ReadonlySet<string> = new Set(['gainMargin', 'phaseMargin', 'modulusMargin']);

/**
 * Requirements with their levels: stability first, listed or not, and of several on the same measure and law only the
 * strictest.
 *
 * @param inputs the inputs that laws act on, in the order of the laws
 */
export function composeRequirements(
  requirements: readonly Requirement[],
  path: readonly PathPart[],
  inputs: readonly string[],
  exact: ExactValues,
  faults: FaultList,
): ComposedRequirement[] {
  const firstLaw = inputs.length > 0 ? 0 : -1;
  const strictest = new Map<string, ComposedRequirement>([
    ['stability', { measure: 'stability', limit: 0, law: firstLaw }],
  ]);
  requirements.forEach((requirement, index) => {
    if (requirement.measure === 'stability') return;
    const { measure } = requirement;
    const isMargin = MARGINS.has(measure);
    if (isMargin && inputs.length === 0) {
      faults.add(
        [...path, index, 'measure'],
        'a margin needs a loop that can be broken; add a law under control',
      );
    }
    const level = exact.number(requirement.atLeast, [...path, index, 'atLeast']);
    if (level === undefined) return;
    const fault = requirementLevelFault(measure, level);
    if (fault !== undefined) faults.add([...path, index, 'atLeast'], fault);
    const input = 'input' in requirement ? requirement.input : undefined;
    const law = input === undefined ? firstLaw : inputs.indexOf(input);
    const key = isMargin ? `${measure} ${law}` : measure;
    const other = strictest.get(key);
    if (other === undefined || level > other.limit) strictest.set(key, { measure, limit: level, law });
  });
  return [...strictest.values()];
}
