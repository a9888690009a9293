import { readStudyValue, StudyFaultError, type Fault, type Study } from '../../../contracts';
import { composeStudy } from '../compose-study';
import type { ComposedStudy } from '../composed-study';

/** A usable study of a drive and a carriage; tests change one thing each. */
export const LIFT_TABLE = {
  format: 'tareline-study',
  version: 1,
  machine: {
    coordinates: ['q1', 'q2'],
    mass: [
      ['M', '0'],
      ['0', 'm0 + m'],
    ],
    damping: [
      ['c', '-c'],
      ['-c', 'c'],
    ],
    stiffness: [
      ['k', '-k'],
      ['-k', 'k'],
    ],
    inputs: { u: ['1', '0'], v: ['0', '1'] },
    disturbances: { push: ['0', '1'] },
    outputs: { drive: { position: ['1', '0'] }, speed: { velocity: ['0', 1] } },
  },
  parameters: [
    { id: 'm', unit: 'kg', nominal: 300, low: 40, high: 480, minimum: 0, kind: 'use' },
    { id: 'k', unit: 'kN/m', nominal: 150, low: 120, high: 185, minimum: 0 },
    { id: 'c', nominal: 620, low: 470, high: 800 },
    { id: 'tau', unit: 'ms', nominal: 8, low: 5, high: 11, minimum: 0.1 },
    { id: 'M', nominal: 180 },
    { id: 'm0', nominal: 120 },
  ],
  payload: 'm',
  control: { law: 'pid', input: 'u', output: 'drive', kp: 9400, ki: 11000, kd: 4100, derivativeTime: 0.002 },
  actuator: { lag: 'tau' },
  requirements: [{ measure: 'stability' }, { measure: 'dampingRatio', atLeast: 0.15 }],
};

/** A machine of first order with one state, dynamics and descriptor as given. */
export const firstOrder = (dynamics: string, descriptor?: string) => ({
  states: ['x'],
  ...(descriptor === undefined ? {} : { descriptor: [[descriptor]] }),
  dynamics: [[dynamics]],
  inputs: { u: ['1'] },
  outputs: { y: ['1'] },
});

/** A study of a first-order machine in a parameter p from 1 to 3 and an exact q = 2. */
export const FIRST_ORDER = {
  format: 'tareline-study',
  version: 1,
  machine: firstOrder('-p'),
  parameters: [
    { id: 'p', nominal: 2, low: 1, high: 3 },
    { id: 'q', nominal: 2 },
  ],
  control: { law: 'pid', input: 'u', output: 'y', kp: 1, ki: 0, kd: 0 },
  requirements: [{ measure: 'stability' }],
};

type Changes = Readonly<Record<string, unknown>>;

export function studyOf(base: object, changes: Changes = {}): Study {
  return readStudyValue(JSON.parse(JSON.stringify({ ...base, ...changes }))).study;
}

export function composed(base: object, changes: Changes = {}): ComposedStudy {
  return composeStudy(studyOf(base, changes));
}

/** Faults of a study that passes reading and fails composing, as `path: message`. */
export function faultsOf(study: Study): string[] {
  try {
    composeStudy(study);
  } catch (error) {
    if (error instanceof StudyFaultError)
      return error.faults.map(({ path, message }: Fault) => `${path}: ${message}`);
    throw error;
  }
  return [];
}

export function faults(base: object, changes: Changes = {}): string[] {
  return faultsOf(studyOf(base, changes));
}
