import {
  isTemplateMachine,
  type CustomMachine,
  type Fault,
  type Machine,
  type TemplateId,
} from '../contracts';
import { balancingCarrier } from './balancing-carrier';
import { massSpringDamper } from './mass-spring-damper';
import { singleTrack } from './single-track';
import { suspendedCabin } from './suspended-cabin';
import type { MachineTemplate } from './template';
import { twoMassDrive } from './two-mass-drive';

/** Every template, in the order in which people choose from them. */
export const templates: readonly MachineTemplate[] = [
  massSpringDamper,
  twoMassDrive,
  balancingCarrier,
  suspendedCabin,
  singleTrack,
];

const byId = new Map<TemplateId, MachineTemplate>(templates.map((template) => [template.id, template]));

/** The template with this id. Throws RangeError for an id that no template has. */
export function templateOf(id: TemplateId): MachineTemplate {
  const template = byId.get(id);
  if (template === undefined) throw new RangeError(`There is no template ${id}.`);
  return template;
}

/** A machine written out: the equations of its template, or the machine itself. */
export function expandMachine(machine: Machine): CustomMachine {
  return isTemplateMachine(machine) ? templateOf(machine.template).machine : machine;
}

/**
 * Faults of a template's machine in a study that declares these ids (parameters and definitions): every parameter of
 * the template must be among them.
 */
export function checkTemplateParameters(machine: Machine, declared: ReadonlySet<string>): Fault[] {
  if (!isTemplateMachine(machine)) return [];
  const { id, parameters } = templateOf(machine.template);
  return parameters
    .filter((parameter) => !declared.has(parameter.id))
    .map((parameter) => ({
      path: 'parameters',
      message: `the template ${id} needs ${parameter.id} (${parameter.label.toLowerCase()}, ${parameter.unit})`,
    }));
}
