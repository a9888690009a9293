import {
  isSecondOrder,
  isTemplateMachine,
  lawsOf,
  stateNames,
  type CustomMachine,
  type Law,
  type Machine,
  type Parameter,
  type Study,
  type TemplateId,
} from '../../../../shared/contracts';
import { expandMachine, templateOf } from '../../../../shared/machines';
import { usedNames } from './used-names';

/** The machine's choices besides the templates. */
export const OWN_MACHINE = 'own';
export const OWN_STATES = 'own-states';

/** The chosen kind of machine: a template's id, OWN_MACHINE (second order) or OWN_STATES (first order). */
export function machineChoice({ machine }: Study): string {
  if (isTemplateMachine(machine)) return machine.template;
  return isSecondOrder(machine) ? OWN_MACHINE : OWN_STATES;
}

/**
 * The study with another machine. Parameters that both machines have carry over with their values; those that only the
 * old template needs leave, unless an expression uses them; those that the new one lacks come with its starting values.
 * An own machine starts from the equations of the template where these are of the chosen order, else from one state.
 */
export function withMachine(study: Study, choice: string): Study {
  if (choice === machineChoice(study)) return study;
  if (choice === OWN_MACHINE || choice === OWN_STATES) return withOwnMachine(study, choice);
  const template = templateOf(choice as TemplateId);
  const machine: Machine = { template: template.id };
  const old = isTemplateMachine(study.machine)
    ? templateOf(study.machine.template).parameters.map(({ id }) => id)
    : [];
  const used = usedNames(study);
  const wanted = new Map(template.parameters.map((parameter) => [parameter.id, parameter]));
  const kept = study.parameters.filter(({ id }) => wanted.has(id) || !old.includes(id) || used.has(id));
  const declared = new Set([...kept.map(({ id }) => id), ...Object.keys(study.definitions ?? {})]);
  const added = template.parameters
    .filter(({ id }) => !declared.has(id))
    .map(({ id, label, unit, nominal, low, high, minimum, maximum, kind }): Parameter => ({
      id,
      label,
      unit,
      nominal,
      ...(low === undefined || high === undefined ? {} : { low, high }),
      ...(minimum === undefined ? {} : { minimum }),
      ...(maximum === undefined ? {} : { maximum }),
      ...(kind === undefined ? {} : { kind }),
    }));
  const parameters = [...kept, ...added];
  return fitted({ ...study, machine, parameters }, template.machine);
}

function withOwnMachine(study: Study, choice: typeof OWN_MACHINE | typeof OWN_STATES): Study {
  const expanded = expandMachine(study.machine);
  if (isSecondOrder(expanded) === (choice === OWN_MACHINE)) return { ...study, machine: expanded };
  const mass = study.payload ?? '1';
  const machine: CustomMachine =
    choice === OWN_MACHINE
      ? {
          coordinates: ['q'],
          mass: [[mass]],
          damping: [['0']],
          stiffness: [['0']],
          inputs: { u: ['1'] },
          outputs: { q: { position: ['1'] } },
        }
      : {
          states: ['v'],
          descriptor: [[mass]],
          dynamics: [['0']],
          inputs: { u: ['1'] },
          outputs: { v: ['1'] },
        };
  return fitted({ ...study, machine }, machine);
}

/** The study with laws, payload and map that name only what is there. */
function fitted(study: Study, machine: CustomMachine): Study {
  const ids = study.parameters.map(({ id }) => id);
  const { payload, map, control, ...rest } = study;
  const inputs = Object.keys(machine.inputs ?? {});
  const laws = lawsOf(control)
    .slice(0, inputs.length)
    .map((law, index) => fittedLaw(law, machine, inputs[index]));
  const isSet = (id: string | undefined) => id !== undefined && ids.includes(id);
  const named = isSet(payload) ? payload : ids.includes('m') ? 'm' : undefined;
  return {
    ...rest,
    ...(named === undefined ? {} : { payload: named }),
    ...(laws.length === 0 ? {} : { control: Array.isArray(control) ? laws : laws[0] }),
    ...(map !== undefined && isSet(map.x) && isSet(map.y) ? { map } : {}),
  };
}

function fittedLaw(law: Law, machine: CustomMachine, input: string): Law {
  const inputs = Object.keys(machine.inputs ?? {});
  const outputs = Object.keys(machine.outputs ?? {});
  const fitting = {
    input: inputs.includes(law.input) ? law.input : input,
    output: 'output' in law && outputs.includes(law.output) ? law.output : outputs[0],
  };
  if (law.law !== 'state-feedback') return { ...law, ...fitting };
  const states = stateNames(machine);
  const gains = Object.fromEntries(Object.entries(law.gains).filter(([name]) => states.includes(name)));
  const { integral } = law;
  return {
    ...law,
    input: fitting.input,
    gains,
    ...(integral === undefined
      ? {}
      : {
          integral: outputs.includes(integral.output) ? integral : { ...integral, output: outputs[0] },
        }),
  };
}
