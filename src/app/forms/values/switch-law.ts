import {
  isTemplateMachine,
  lawsOf,
  stateNames,
  type Law,
  type LawName,
  type Study,
} from '../../../../shared/contracts';
import { expandMachine, templateOf } from '../../../../shared/machines';
import { withValueAt } from './at-path';

export const NO_LAW = 'none';

/** Where the law with this index stands in the study. */
export function lawsPath({ control }: Study, index: number): (string | number)[] {
  return Array.isArray(control) ? ['control', index] : ['control'];
}

/** A law of this kind that does nothing yet, between the given input and output. */
function idleLaw(kind: LawName, input: string, output: string, states: readonly string[]): Law {
  switch (kind) {
    case 'pid':
      return { law: 'pid', input, output, kp: 0, ki: 0, kd: 0 };
    case 'state-feedback':
      return { law: 'state-feedback', input, gains: Object.fromEntries(states.map((name) => [name, 0])) };
    case 'transfer-function':
      return { law: 'transfer-function', input, output, numerator: [0], denominator: [1] };
    case 'state-space':
      return { law: 'state-space', input, output, A: [[-1]], B: [1], C: [0], D: 0 };
  }
}

/** The study with another kind of law at this place, between the same input and output; NO_LAW takes the law away. */
export function withLaw(study: Study, index: number, kind: string): Study {
  const laws = lawsOf(study.control);
  const old = laws[index];
  if (kind === (old?.law ?? NO_LAW)) return study;
  const rest = laws.filter((_, place) => place !== index);
  const machine = expandMachine(study.machine);
  const inputs = Object.keys(machine.inputs ?? {});
  const free = inputs.find((name) => !rest.some((law) => law.input === name));
  const input = old?.input ?? free ?? inputs[0] ?? 'u';
  const output =
    old !== undefined && 'output' in old ? old.output : (Object.keys(machine.outputs ?? {})[0] ?? 'y');
  const changed =
    kind === NO_LAW
      ? rest
      : [
          ...laws.slice(0, index),
          idleLaw(kind as LawName, input, output, stateNames(machine)),
          ...laws.slice(index + 1),
        ];
  const control = changed.length > 1 ? changed : changed[0];
  return withValueAt(study, ['control'], control);
}

export interface Signal {
  readonly label: string;
  readonly unit: string | undefined;
}

/** What a coordinate, state, input or output is called, and its unit where a template knows it. */
export function signalOf({ machine }: Study, name: string): Signal {
  const known = isTemplateMachine(machine) ? templateOf(machine.template).signals[name] : undefined;
  return known === undefined ? { label: name, unit: undefined } : known;
}

/** Unit of a gain from a measured quantity to an input, after so many integrations (negative: derivatives). */
export function gainUnit(study: Study, input: string, measured: string, integrations = 0): string {
  const over = signalOf(study, input).unit;
  const under = signalOf(study, measured).unit;
  if (over === undefined || under === undefined) return '';
  const [length, perSecond] = under.endsWith('/s') ? [under.slice(0, -2), -1] : [under, 0];
  const seconds = integrations + perSecond;
  // Degrees of freedom in rad: the radian is left out where a torque is divided by it.
  const base = over === length ? '1' : `${over}/${length}`;
  if (seconds === 0) return base;
  if (seconds > 0)
    return over === length ? (seconds === 1 ? '1/s' : `1/s^${seconds}`) : `${over}/(${length} s)`;
  return over === length ? 's' : `${over} s/${length}`;
}
