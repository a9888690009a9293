import { describe, expect, it } from 'vitest';
import { companionMachine } from './support/companion-machine';
import { runStudy } from './support/run-study';
import { expectLargest, expectSmallest } from './support/two-sided';

// Loading crane: trolley of 1000 kg, load on a rope, g = 10 m/s², state feedback of trolley and rope angle. Ackermann
// 1993, Robust Control: Systems with Uncertain Physical Parameters. Characteristic polynomial, derived below from the
// two equations of motion: a4 = L mC, a3 = k2 L − k4, a2 = (mC + mL) g + k1 L − k3, a1 = k2 g, a0 = k1 g.
const crane = {
  coordinates: ['x', 'theta'],
  mass: [
    ['1000 + mL', 'mL*L'],
    [1, 'L'],
  ],
  damping: [
    [0, 0],
    [0, 0],
  ],
  stiffness: [
    [0, 0],
    [0, 10],
  ],
  inputs: { force: [1, 0] },
};
const feedback = (k1: number, k2: number, k3: number | string, k4: number) => ({
  law: 'state-feedback',
  input: 'force',
  gains: { x: k1, "x'": k2, theta: k3, "theta'": k4 },
});
const polynomial = (k1: number, k2: number, k3: number | string, k4: number) =>
  companionMachine(['L*1000', `${k2}*L - ${k4}`, `(1000 + mL)*10 + ${k1}*L - (${k3})`, k2 * 10, k1 * 10]);
const rope = { id: 'L', unit: 'm', nominal: 12, low: 8, high: 16, minimum: 0, kind: 'use' };
const load = { id: 'mL', unit: 'kg', nominal: 1000, low: 50, high: 2395, minimum: 0, kind: 'use' };

describe('a loading crane', () => {
  it('is stable with K = [500 2769 −21556 0] for ropes of 8–16 m and loads of 50–2395 kg', () => {
    // Claim of the source, from memory; recomputed: the largest real part over the box is −0.246752.
    const requirements = (atLeast: number) => [{ measure: 'decayRate', atLeast }];
    const gains = [500, 2769, -21556, 0] as const;
    const run = (rate: number) =>
      runStudy({
        machine: crane,
        control: feedback(...gains),
        parameters: [rope, load],
        requirements: requirements(rate),
      });
    expect(run(0).bands).toEqual({ verdict: 'holds', proof: 'proved' });
    expect(run(0.2467).bands).toEqual({ verdict: 'holds', proof: 'proved' });
    expect(run(0.2468).bands).toMatchObject({ verdict: 'fails', requirement: 'decayRate' });
    const companion = runStudy({ machine: polynomial(...gains), parameters: [rope, load] });
    expect(companion.bands).toEqual({ verdict: 'holds', proof: 'proved' });
  });

  // Derived: with k4 = 0 and k1, k2 > 0 the loop is stable if and only if mL > k3/g, whatever the rope.
  it.each([
    ['as a machine under state feedback', { machine: crane, control: feedback(500, 2769, 5000, 0) }],
    ['as its characteristic polynomial', { machine: polynomial(500, 2769, 5000, 0) }],
  ])('with k3 = 5000 needs a load above exactly 500 kg, any rope, %s', (_, described) => {
    const { smallestPayload, largestPayload } = runStudy({
      ...described,
      parameters: [rope, load],
      payload: 'mL',
    });
    expectSmallest(smallestPayload, 500, 1000);
    expect(smallestPayload?.requirement).toBe('stability');
    expect(largestPayload).toMatchObject({ provedTo: 5 * 2395, failsAt: null, searchedUpTo: 5 * 2395 });
  });

  it('with a gain that follows the load keeps the derived limits', () => {
    // Derived: mL > k3/g with k3 = 5 mL + 2500 is mL > 500 again; with k3 = 12 mL − 1400 it is mL < 700.
    const run = (k3: string, nominal: number) =>
      runStudy({
        machine: crane,
        control: feedback(500, 2769, k3, 0),
        parameters: [rope, { ...load, nominal }],
        payload: 'mL',
      });
    expectSmallest(run('5*mL + 2500', 1000).smallestPayload, 500, 1000);
    const falling = run('12*mL - 1400', 600);
    expectLargest(falling.largestPayload, 700, 600);
    expect(falling.smallestPayload).toMatchObject({ provedTo: 0, failsAt: null });
  });

  it('loses stability at the derived frequency', () => {
    // Derived: at the limit s² (a4 s² + a2) + s (a3 s² + a1) = −a0 with s² = −a1/a3 = −g/L.
    const { smallestPayload } = runStudy({
      machine: crane,
      control: feedback(500, 2769, 5000, 0),
      parameters: [{ id: 'L', nominal: 12 }, load],
      payload: 'mL',
    });
    expect(smallestPayload?.frequency).toBeCloseTo(Math.sqrt(10 / 12), 3);
  });
});
