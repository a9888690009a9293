import { describe, expect, it } from 'vitest';
import { companionMachine } from './support/companion-machine';
import { runStudy } from './support/run-study';
import { expectLargest } from './support/two-sided';

// s³ + (q1+q2+1) s² + (q1+q2+3) s + (1 + r² + 6 q1 + 6 q2 + 2 q1 q2) is unstable exactly inside the circle of radius r
// around (1, 1) (derived by the Routh test). Ackermann, Hu & Kaesbauer 1990, IEEE TAC 35(3):352–356.
const island = (radius: number) =>
  companionMachine([1, 'q1 + q2 + 1', 'q1 + q2 + 3', `1 + ${radius}^2 + 6*q1 + 6*q2 + 2*q1*q2`]);
const band = (id: string, nominal: number, low: number, high: number) => ({ id, nominal, low, high });

describe('an island of unstable points among stable ones', () => {
  it('is found although all four corners of the box are stable', () => {
    // Derived.
    for (const q1 of [0.3, 2.5]) {
      for (const q2 of [0.3, 1.7]) {
        const corner = runStudy({
          machine: island(0.5),
          parameters: [
            { id: 'q1', nominal: q1 },
            { id: 'q2', nominal: q2 },
          ],
        });
        expect(corner.nominal.stable).toBe(true);
        expect(corner.bands.verdict).toBe('holds');
      }
    }
    const { bands } = runStudy({
      machine: island(0.5),
      parameters: [band('q1', 2, 0.3, 2.5), band('q2', 1, 0.3, 1.7)],
    });
    expect(bands).toMatchObject({ verdict: 'fails', proof: 'proved', requirement: 'stability' });
    const { q1, q2 } = bands.witness as { q1: number; q2: number };
    expect((q1 - 1) ** 2 + (q2 - 1) ** 2).toBeLessThan(0.25);
  });

  it('lies 0.5 away from (2, 1) when both bands grow alike', () => {
    // Derived: the nearest point of the circle in the larger of both distances is (1.5, 1).
    const { bandStretch } = runStudy({
      machine: island(0.5),
      parameters: [band('q1', 2, 1, 3), band('q2', 1, 0, 2)],
    });
    expectLargest(bandStretch, 0.5);
    expect(bandStretch?.failsAt).toBeCloseTo(0.5, 4);
    expect(bandStretch?.witness?.q1).toBeCloseTo(1.5, 4);
    expect(bandStretch?.witness?.q2).toBeCloseTo(1, 1);
  });

  it('of radius 0 is neither proved nor refuted beyond the distance at which it is touched', () => {
    // Derived: the only point that is not strictly stable is (1, 1), with poles on the axis.
    const { bandStretch, bands } = runStudy({
      machine: island(0),
      parameters: [band('q1', 2, 1, 3), band('q2', 1, 0, 2)],
    });
    expect(bandStretch).toMatchObject({ failsAt: null, undecided: true, proof: 'proved' });
    expect(bandStretch?.provedTo).toBeGreaterThan(0.99999);
    expect(bandStretch?.provedTo).toBeLessThanOrEqual(1);
    expect(bandStretch?.openShare).toBeGreaterThan(0);
    expect(bandStretch?.openShare).toBeLessThan(0.01);
    expect(bands).toMatchObject({ verdict: 'undecided', proof: 'proved' });
  });

  it('is proved away from a box that it does not reach', () => {
    const { bands } = runStudy({
      machine: island(0.5),
      parameters: [band('q1', 2, 1.501, 2.5), band('q2', 1, 0.3, 1.7)],
    });
    expect(bands).toEqual({ verdict: 'holds', proof: 'proved' });
  });
});
