import { describe, expect, it } from 'vitest';
import { companionPlant } from './support/companion-machine';
import { runStudy } from './support/run-study';
import { expectSmallest, expectWitness } from './support/two-sided';

// Automatic steering of a city bus. Ackermann 1993, Robust Control: Systems with Uncertain Physical Parameters (model
// and ranges from memory). Mass m in t, speed v in m/s. Values recomputed from this formula; the published text prints
// rounded coefficients.
const plant = companionPlant(
  ['609.8*m*v^2', '388600*v', '48280*v^2'],
  ['m^2*v^2', '1077*m*v', '16.8*m*v^2 + 270000', 0, 0, 0],
);
/** 15625 (0.15 s² + 0.7 s + 0.6) / ((s + 25)(s² + 25 s + 625)), multiplied out. */
const control = {
  law: 'transfer-function',
  input: 'u',
  output: 'y',
  numerator: ['15625*0.15', '15625*0.7', '15625*0.6'],
  denominator: [1, 50, 1250, 15625],
};
const ranges = [
  { id: 'v', nominal: 10, low: 3, high: 20, minimum: 0, kind: 'use' },
  { id: 'm', nominal: 20, low: 9.95, high: 32, minimum: 0, kind: 'use' },
];

describe('the steering of a city bus', () => {
  it('is stable for every speed and mass of its range', () => {
    // Claim of the source, from memory; recomputed on a grid.
    const { bands, nominal } = runStudy({ machine: plant, control, parameters: ranges });
    expect(nominal.stable).toBe(true);
    expect(nominal.poles).toHaveLength(8);
    expect(bands).toEqual({ verdict: 'holds', proof: 'proved' });
  });

  it('decays at 0.352892 1/s or faster, slowest at 3 m/s and 9.95 t', () => {
    // Recomputed: −0.3528918 is the largest real part over the box.
    const run = (atLeast: number) =>
      runStudy({
        machine: plant,
        control,
        parameters: ranges,
        requirements: [{ measure: 'stability' }, { measure: 'decayRate', atLeast }],
      });
    expect(run(0.35289).bands).toEqual({ verdict: 'holds', proof: 'proved' });
    const beyond = run(0.352895).bands;
    expect(beyond).toMatchObject({ verdict: 'fails', requirement: 'decayRate', witness: { v: 3, m: 9.95 } });
    expect(beyond.value).toBeCloseTo(0.352892, 6);
  });

  // Recomputed.
  it.each([
    [10, 3.10443, 20.785],
    [15, 4.193663, 18.5125],
    [20, 4.665357, 17.5254],
  ])('at %d m/s needs a mass above %d t', (speed, limit, frequency) => {
    const { smallestPayload } = runStudy({
      machine: plant,
      control,
      parameters: [
        { id: 'v', nominal: speed },
        { id: 'm', nominal: 20, minimum: 0 },
      ],
      payload: 'm',
      searchUpTo: 20,
      searchDownTo: 1,
    });
    expectSmallest(smallestPayload, limit, 20);
    expectWitness(smallestPayload, { m: limit }, 1e-4);
    expect(smallestPayload?.frequency).toBeCloseTo(frequency, 2);
  });
});
