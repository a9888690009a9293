import { lawsOf } from './control';
import type { Fault } from './fault';
import { identifierFault } from './identifier';
import { formatPath, type PathPart } from './path';
import { quoted } from './quoted';
import type { Study } from './study';

/** Path of the law with this index, as the study writes it. */
export function lawPath(study: Study, index: number): PathPart[] {
  return Array.isArray(study.control) ? ['control', index] : ['control'];
}

/**
 * Faults of names that do not depend on the machine: ids of parameters and definitions (form, reserved, used twice),
 * the payload and the axes of the map (must be parameters), and two laws for the same input.
 */
export function checkDeclaredNames(study: Study): Fault[] {
  const faults: Fault[] = [];
  const fault = (path: readonly PathPart[], message: string) =>
    faults.push({ path: formatPath(path), message });

  const parameters = new Set<string>();
  study.parameters.forEach(({ id }, index) => {
    const unusable = identifierFault(id);
    if (unusable !== undefined) fault(['parameters', index, 'id'], unusable);
    else if (parameters.has(id)) fault(['parameters', index, 'id'], `${quoted(id)} is used twice`);
    parameters.add(id);
  });

  for (const name of Object.keys(study.definitions ?? {})) {
    const unusable = identifierFault(name);
    if (unusable !== undefined) fault(['definitions', name], unusable);
    else if (parameters.has(name)) fault(['definitions', name], `${quoted(name)} is also a parameter`);
  }

  const parameter = (path: readonly PathPart[], id: string | undefined) => {
    if (id === undefined || parameters.has(id)) return;
    fault(path, `unknown parameter ${quoted(id)}; ${listed('the study has', [...parameters])}`);
  };
  parameter(['payload'], study.payload);
  parameter(['map', 'x'], study.map?.x);
  parameter(['map', 'y'], study.map?.y);
  if (study.map !== undefined && study.map.x === study.map.y) fault(['map', 'y'], 'must differ from x');

  const inputs = new Set<string>();
  lawsOf(study.control).forEach(({ input }, index) => {
    if (inputs.has(input)) fault([...lawPath(study, index), 'input'], `${quoted(input)} has a law already`);
    inputs.add(input);
  });
  return faults;
}

/** `the machine has u, v`, cut when there are many; `the machine has none`. */
export function listed(lead: string, names: readonly string[]): string {
  if (names.length === 0) return `${lead} none`;
  const shown = names.slice(0, 12).map((name) => (name.length > 40 ? `${name.slice(0, 40)}…` : name));
  return `${lead} ${shown.join(', ')}${names.length > shown.length ? ', …' : ''}`;
}
