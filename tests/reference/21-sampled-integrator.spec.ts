import { describe, expect, it } from 'vitest';
import { runStudy } from './support/run-study';
import { expectLargest } from './support/two-sided';

// An integrator K/s under a digital controller of period T that needs one period for computing and then holds.
// Derived: z² − z + K T = 0, so that the true limit is K T < 1. With 1.5 T as a pure delay it is π/3, with the delay's
// second-order Padé form 1.05505 (recomputed): both on the unsafe side.
const TRUE_LIMIT = 1;
const DELAY_LIMIT = Math.PI / 3;
const integrator = (period: number, padeOrder?: number) => ({
  machine: { states: ['x'], dynamics: [[0]], inputs: { u: ['K'] }, outputs: { y: [1] } },
  control: { law: 'pid', input: 'u', output: 'y', kp: 1, ki: 0, kd: 0 },
  parameters: [{ id: 'K', nominal: 0.5 / period }],
  payload: 'K',
  searchUpTo: 5 / period,
  sampling: { period, ...(padeOrder !== undefined && { padeOrder }) },
});

describe('a sampled integrator', () => {
  it.each([1, 0.01])('of period %d s reads the limit 1.055/T where the true one is 1/T', (period) => {
    const { largestPayload, nominal } = runStudy(integrator(period));
    expect(nominal.poles).toHaveLength(3);
    expectLargest(largestPayload, 1.0550504633 / period, 0.5 / period);
    expect(largestPayload?.provedTo).toBeGreaterThan(TRUE_LIMIT / period);
    // At the limit abs(L) = K/ω = 1.
    expect((largestPayload?.frequency ?? NaN) * period).toBeCloseTo(1.0550505, 3);
  });

  it.each([1, 0.01])('of period %d s is reported as approximated, with the phase it lacks', (period) => {
    // Recomputed: x − 2 atan2(x/2, 1 − x²/12) with x = 1.5 · 1.0550505.
    const { delay } = runStudy(integrator(period));
    expect(delay?.approximated).toBe(true);
    expect(delay?.phaseShortfall).toBeCloseTo(0.01177937, 4);
    expect(delay?.phaseShortfall).toBeGreaterThan(0);
  });

  it('comes to π/3 as the Padé order grows, never to the true limit', () => {
    // Recomputed for orders 1 to 3: 4/3, 1.0550505, 1.0473392.
    const limits: [number, number][] = [
      [1, 4 / 3],
      [2, 1.0550504633],
      [3, 1.0473392426],
      [6, DELAY_LIMIT],
    ];
    for (const [order, limit] of limits) {
      const { largestPayload, delay } = runStudy(integrator(1, order));
      expectLargest(largestPayload, limit, 0.5);
      expect(delay?.approximated).toBe(true);
      expect(largestPayload?.failsAt).toBeGreaterThan(TRUE_LIMIT);
    }
  });

  it('says nothing of delays where there is none', () => {
    const { sampling, ...continuous } = integrator(1);
    expect(sampling.period).toBe(1);
    const { delay, largestPayload } = runStudy(continuous);
    expect(delay).toBeUndefined();
    expect(largestPayload).toMatchObject({ provedTo: 5, failsAt: null });
  });
});
