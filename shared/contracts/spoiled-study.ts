import { StudyFaultError, type Fault } from './fault';
import { readStudy } from './study-text';

/** For specs: a study that is usable as it stands; each spoils one thing. */
export function liftTable() {
  return {
    format: 'tareline-study',
    version: 1,
    name: 'Lift table, long column',
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
      inputs: { u: ['1', '0'] },
      disturbances: { push: ['0', '1'] },
      outputs: { drive: { position: ['1', '0'] }, carriage: { position: ['0', '1'] } },
    },
    parameters: [
      { id: 'm', label: 'Payload', unit: 'kg', nominal: 300, low: 40, high: 480, minimum: 0, kind: 'use' },
      { id: 'k', unit: 'N/m', nominal: 150000, low: 120000, high: 185000, minimum: 0 },
      { id: 'c', unit: 'N s/m', nominal: 620, low: 470, high: 800, minimum: 0 },
      { id: 'tau', unit: 's', nominal: 0.008, low: 0.005, high: 0.011, minimum: 0.0001 },
      { id: 'M', nominal: 180 },
      { id: 'm0', nominal: 120 },
    ],
    payload: 'm',
    searchUpTo: 2400,
    searchDownTo: 0,
    control: {
      law: 'pid',
      input: 'u',
      output: 'drive',
      kp: 9400,
      ki: 11000,
      kd: 4100,
      derivativeTime: 0.002,
    },
    actuator: { lag: 'tau' },
    requirements: [
      { measure: 'stability' },
      { measure: 'dampingRatio', atLeast: 0.15 },
      { measure: 'modulusMargin', atLeast: 0.5 },
    ],
    map: { x: 'm', xFrom: 0, xTo: 900, y: 'k', columns: 41, rows: 31, measure: 'closest', others: 'nominal' },
  };
}

export const FEEDBACK = { law: 'state-feedback', input: 'u', gains: { q1: 1, "q2'": 2 } };

export type Step = string | number;

/** The study with the value at a path replaced; `undefined` removes the key. */
export function spoiled(path: readonly Step[], value: unknown): string {
  const study: unknown = liftTable();
  const parent = path.slice(0, -1).reduce<unknown>((at, step) => Reflect.get(Object(at), step), study);
  Reflect.set(Object(parent), path[path.length - 1], value);
  return JSON.stringify(study);
}

export function faultsOf(text: string): readonly Fault[] {
  try {
    readStudy(text);
  } catch (error) {
    if (error instanceof StudyFaultError) return error.faults;
    throw error;
  }
  return [];
}
