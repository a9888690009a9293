import type { Parameter, Study } from '../../../shared/contracts';

export interface StudyChanges {
  /** The payload band's high end, in kg: part of a scenario. */
  readonly heaviest?: number;
  /** The nominal belt stiffness, in N/m: part of a variant. */
  readonly belt?: number;
  readonly name?: string;
}

/** A study of a lift table with two masses, as a page would send it. */
export function liftTableStudy({
  heaviest = 480,
  belt = 150_000,
  name = 'Lift table',
}: StudyChanges = {}): Study & { parameters: Parameter[] } {
  return {
    format: 'tareline-study',
    version: 1,
    name,
    machine: { template: 'two-mass-drive' },
    parameters: [
      {
        id: 'm',
        label: 'Payload',
        unit: 'kg',
        nominal: 300,
        low: 40,
        high: heaviest,
        minimum: 0,
        kind: 'use',
      },
      { id: 'm0', nominal: 120 },
      { id: 'M', nominal: 180 },
      { id: 'k', label: 'Belt', unit: 'N/m', nominal: belt, low: 120_000, high: 185_000, minimum: 0 },
      { id: 'c', unit: 'N s/m', nominal: 620, low: 470, high: 800, minimum: 0 },
      { id: 'b', nominal: 0 },
    ],
    payload: 'm',
    control: {
      law: 'pid',
      input: 'u',
      output: 'drive',
      kp: 9400,
      ki: 11000,
      kd: 4100,
      derivativeTime: 0.002,
    },
    requirements: [{ measure: 'stability' }, { measure: 'dampingRatio', atLeast: 0.15 }],
  };
}
