import process from 'node:process';
import type { AttackEffort } from './attack-box';

export interface AttackSeries extends AttackEffort {
  readonly firstSeed: number;
  readonly machines: number;
}

/**
 * How long to attack. A longer run is asked for from outside: TARELINE_ATTACK_MACHINES, TARELINE_ATTACK_SAMPLES and
 * TARELINE_ATTACK_SEED, the first seed.
 */
export function availableEffort(): AttackSeries {
  return {
    machines: positive('TARELINE_ATTACK_MACHINES', 210),
    samples: positive('TARELINE_ATTACK_SAMPLES', 1000),
    firstSeed: positive('TARELINE_ATTACK_SEED', 1),
    starts: 3,
    steps: 120,
  };
}

function positive(name: string, otherwise: number): number {
  const given = process.env[name];
  if (given === undefined || given === '') return otherwise;
  const value = Number(given);
  if (!Number.isInteger(value) || value < 1)
    throw new RangeError(`${name} must be a positive integer, not "${given}"`);
  return value;
}
