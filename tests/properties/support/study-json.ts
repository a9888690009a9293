import type { HardwareModel, LawModel, MachineModel, StudyModel } from './study-model';
import type { Term } from './term';

const text = (term: Term): string => term.text;
const row = (terms: readonly Term[]): string[] => terms.map(text);
const matrix = (rows: readonly Term[][]): string[][] => rows.map(row);

function mapped<T, R>(record: Record<string, T>, convert: (value: T) => R): Record<string, R> {
  return Object.fromEntries(Object.entries(record).map(([key, value]) => [key, convert(value)]));
}

function machineJson(machine: MachineModel): object {
  if (machine.order === 1) {
    return {
      states: machine.names,
      ...(machine.descriptor && { descriptor: matrix(machine.descriptor) }),
      dynamics: matrix(machine.dynamics),
      inputs: mapped(machine.inputs, row),
      outputs: mapped(machine.outputs, row),
    };
  }
  return {
    coordinates: machine.names,
    mass: matrix(machine.mass),
    damping: matrix(machine.damping),
    stiffness: matrix(machine.stiffness),
    inputs: mapped(machine.inputs, row),
    outputs: mapped(machine.outputs, ({ position, velocity }) => ({
      ...(position && { position: row(position) }),
      ...(velocity && { velocity: row(velocity) }),
    })),
  };
}

function lawJson(law: LawModel): object {
  switch (law.law) {
    case 'pid': {
      const { kp, ki, kd, derivativeTime, ...rest } = law;
      return {
        ...rest,
        kp: text(kp),
        ki: ki ? text(ki) : 0,
        kd: kd ? text(kd) : 0,
        ...(derivativeTime && { derivativeTime: text(derivativeTime) }),
      };
    }
    case 'state-feedback': {
      const { gains, integral, ...rest } = law;
      return {
        ...rest,
        gains: Object.fromEntries(gains.map(({ state, gain }) => [state, text(gain)])),
        ...(integral && { integral: { output: integral.output, gain: text(integral.gain) } }),
      };
    }
    case 'transfer-function':
      return { ...law, numerator: row(law.numerator), denominator: row(law.denominator) };
    case 'state-space': {
      const { law: name, input, output, a, b, c, d } = law;
      return { law: name, input, output, A: matrix(a), B: row(b), C: row(c), D: text(d) };
    }
  }
}

function hardwareJson({ lag, delay, padeOrder }: HardwareModel): object {
  return {
    ...(lag && { lag: text(lag) }),
    ...(delay && { delay: text(delay) }),
    ...(padeOrder && { padeOrder }),
  };
}

/** The study file of a model, as a value that has yet to be read. */
export function studyJson(model: StudyModel): object {
  const { parameters, payload, laws, actuators, sensor, sampling } = model;
  return {
    format: 'tareline-study',
    version: 1,
    name: model.name,
    machine: machineJson(model.machine),
    ...(model.definitions.size > 0 && { definitions: Object.fromEntries(model.definitions) }),
    parameters: parameters.map(({ id, unit, nominal, low, high, minimum, maximum, kind }) => ({
      id,
      nominal,
      ...(unit && { unit }),
      ...(low < high && { low, high }),
      ...(minimum !== undefined && { minimum }),
      ...(maximum !== undefined && { maximum }),
      ...(kind && { kind }),
    })),
    ...(payload !== undefined && { payload: parameters[payload].id }),
    ...(model.searchUpTo !== undefined && { searchUpTo: model.searchUpTo }),
    ...(model.searchDownTo !== undefined && { searchDownTo: model.searchDownTo }),
    ...(laws.length > 0 && { control: laws.length === 1 ? lawJson(laws[0]) : laws.map(lawJson) }),
    ...(actuators.some((actuator) => actuator !== undefined) && {
      actuator:
        laws.length === 1 ? hardwareJson(actuators[0] ?? {}) : actuators.map((a) => hardwareJson(a ?? {})),
    }),
    ...(sensor && { sensor: hardwareJson(sensor) }),
    ...(sampling && {
      sampling: {
        period: text(sampling.period),
        ...(sampling.padeOrder && { padeOrder: sampling.padeOrder }),
      },
    }),
    requirements: model.requirements,
  };
}
