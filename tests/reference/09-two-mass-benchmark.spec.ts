import { describe, expect, it } from 'vitest';
import { runStudy } from './support/run-study';

// Two masses of 1 kg with a spring of 0.5 to 2 N/m between them, force on the first, position of the second measured.
// Wie & Bernstein 1992, J. Guidance 15(5):1057–1059.
const machine = {
  coordinates: ['x1', 'x2'],
  mass: [
    [1, 0],
    [0, 1],
  ],
  damping: [
    [0, 0],
    [0, 0],
  ],
  stiffness: [
    ['k', '-k'],
    ['-k', 'k'],
  ],
  inputs: { u: [1, 0] },
  outputs: { far: { position: [0, 1] }, near: { position: [1, 0] } },
};
const control = (output: string, kp: number, kd: number) => ({
  law: 'pid',
  input: 'u',
  output,
  kp,
  ki: 0,
  kd,
});
const band = { id: 'k', nominal: 1, low: 0.5, high: 2, minimum: 0 };

describe('the two-mass benchmark', () => {
  it.each([0.5, 1, 2])('has the undamped frequency √(2k) at k = %d', (k) => {
    // Derived: 1 rad/s at k = 0.5, 2 rad/s at k = 2.
    const { nominal } = runStudy({ machine, parameters: [{ id: 'k', nominal: k }] });
    expect(nominal.stable).toBe(false);
    const frequencies = nominal.poles.map(({ im }) => Math.abs(im)).sort((a, b) => b - a);
    expect(frequencies[0]).toBeCloseTo(Math.sqrt(2 * k), 10);
    expect(frequencies[1]).toBeCloseTo(Math.sqrt(2 * k), 10);
    expect(frequencies[2]).toBeCloseTo(0, 6);
  });

  // Derived: s⁴ + 2k s² + k Kd s + k Kp has no s³, so its roots add up to 0 and, with Kd ≠ 0, are not all on the axis.
  it.each([
    [1, 1],
    [0.1, 2],
    [5, 0.01],
    [0.01, -0.3],
  ])('is unstable for every spring under a PD law on the far mass, Kp = %d, Kd = %d', (kp, kd) => {
    for (const k of [0.5, 0.75, 1, 1.5, 2]) {
      const { nominal } = runStudy({
        machine,
        control: control('far', kp, kd),
        parameters: [{ id: 'k', nominal: k }],
      });
      expect(nominal).toMatchObject({
        stable: false,
        gainMargin: null,
        phaseMargin: null,
        modulusMargin: null,
      });
      expect(nominal.decayRate).toBeLessThan(0);
    }
    const { bands, bandStretch, largestPayload } = runStudy({
      machine,
      control: control('far', kp, kd),
      parameters: [band],
      payload: 'k',
    });
    expect(bands).toMatchObject({ verdict: 'fails', requirement: 'stability' });
    expect(bandStretch).toMatchObject({ provedTo: null, failsAt: 0 });
    expect(largestPayload).toMatchObject({ provedTo: null, failsAt: 1 });
  });

  it('is stable for every spring of the band under a PD law on the near mass', () => {
    // Derived: the energy falls through the damper that the law amounts to, and no motion leaves it at rest.
    const { bands, largestPayload } = runStudy({
      machine,
      control: control('near', 1, 1),
      parameters: [band],
      payload: 'k',
      searchUpTo: 1000,
    });
    expect(bands).toEqual({ verdict: 'holds', proof: 'proved' });
    expect(largestPayload).toMatchObject({ provedTo: 1000, failsAt: null });
  });
});
