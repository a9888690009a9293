import { describe, expect, it } from 'vitest';
import { runStudy } from './support/run-study';
import { expectLargest, expectWitness } from './support/two-sided';

// A gain and two poles, all uncertain. de Gaston & Safonov 1988, IEEE TAC 33(2):156–171; the data also in Floudas et
// al. 1999, Handbook of Test Problems in Local and Global Optimization, problem 7.3.1 (seen); values recomputed.
describe('a gain and two poles', () => {
  const result = runStudy({
    machine: {
      states: ['z0', 'z1', 'z2', 'z3'],
      dynamics: [
        [0, 1, 0, 0],
        [0, '-p1', 1, 0],
        ['-K', 0, '-p2', '8*K'],
        [1, 0, 0, -10],
      ],
    },
    parameters: [
      { id: 'K', nominal: 800, low: 0, high: 1600 },
      { id: 'p1', nominal: 4, low: 2, high: 6 },
      { id: 'p2', nominal: 6, low: 3, high: 9 },
    ],
  });

  it('has the band stretch 0.3417395531', () => {
    expectLargest(result.bandStretch, 0.3417395531);
    expect(result.bandStretch?.failsAt).toBeCloseTo(0.3417395531, 5);
  });

  it('fails there at the published point and frequency', () => {
    expectWitness(result.bandStretch, { K: 1073.3916, p1: 3.316521, p2: 4.974781 });
    expect(result.bandStretch?.frequency).toBeCloseTo(8.228201, 2);
  });

  it('fails on the full bands', () => {
    expect(result.bands).toMatchObject({ verdict: 'fails', proof: 'proved', requirement: 'stability' });
    expect(result.bands.value).toBeLessThan(0);
  });
});
