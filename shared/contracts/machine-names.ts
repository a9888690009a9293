import { lawsOf } from './control';
import { lawPath, listed } from './declared-names';
import type { Fault } from './fault';
import { nameFault } from './identifier';
import { isSecondOrder, stateNames, type CustomMachine } from './machine';
import { formatPath, type PathPart } from './path';
import { quoted } from './quoted';
import type { Requirement } from './requirement';
import type { Study } from './study';

/**
 * Faults of names against a machine written out in full (a template's machine after expansion): names of coordinates or
 * states, inputs, disturbances and outputs (form, used twice), and every use of one in laws and requirements.
 */
export function checkNames(study: Study, machine: CustomMachine): Fault[] {
  const faults: Fault[] = [];
  const fault = (path: readonly PathPart[], message: string) =>
    faults.push({ path: formatPath(path), message });
  const known = (path: readonly PathPart[], what: string, name: string, names: readonly string[]) => {
    if (!names.includes(name))
      fault(path, `unknown ${what} ${quoted(name)}; ${listed('the machine has', names)}`);
  };

  const listKey = isSecondOrder(machine) ? 'coordinates' : 'states';
  const seen = new Set<string>();
  (isSecondOrder(machine) ? machine.coordinates : machine.states).forEach((name, index) => {
    const unusable = nameFault(name);
    if (unusable !== undefined) fault(['machine', listKey, index], unusable);
    else if (seen.has(name)) fault(['machine', listKey, index], `${quoted(name)} is used twice`);
    seen.add(name);
  });
  for (const key of ['inputs', 'disturbances', 'outputs'] as const) {
    for (const name of Object.keys(machine[key] ?? {})) {
      const unusable = nameFault(name);
      if (unusable !== undefined) fault(['machine', key, name], unusable);
    }
  }

  const inputs = Object.keys(machine.inputs ?? {});
  const outputs = Object.keys(machine.outputs ?? {});
  const states = stateNames(machine);
  const laws = lawsOf(study.control);
  laws.forEach((law, index) => {
    const path = lawPath(study, index);
    known([...path, 'input'], 'input', law.input, inputs);
    if (law.law !== 'state-feedback') {
      known([...path, 'output'], 'output', law.output, outputs);
      return;
    }
    for (const name of Object.keys(law.gains)) known([...path, 'gains', name], 'state', name, states);
    if (law.integral !== undefined)
      known([...path, 'integral', 'output'], 'output', law.integral.output, outputs);
  });

  const controlled = laws.map(({ input }) => input);
  const checkRequirements = (requirements: readonly Requirement[], path: readonly PathPart[]) =>
    requirements.forEach((requirement, index) => {
      if (!('input' in requirement) || requirement.input === undefined) return;
      if (controlled.includes(requirement.input)) return;
      const what = inputs.includes(requirement.input) ? 'no law acts on' : 'unknown input';
      fault(
        [...path, index, 'input'],
        `${what} ${quoted(requirement.input)}; ${listed('the loop can be broken at', controlled)}`,
      );
    });
  checkRequirements(study.requirements, ['requirements']);
  study.rating?.tests?.forEach(({ requirements }, index) => {
    if (requirements !== undefined)
      checkRequirements(requirements, ['rating', 'tests', index, 'requirements']);
  });
  return faults;
}
