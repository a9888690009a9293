import { describe, expect, it } from 'vitest';
import { runStudy } from './support/run-study';
import { expectLargest } from './support/two-sided';

// Two gains that are both off by a little, where each alone may be off by a lot. Zhou & Doyle 1998, Essentials of Robust
// Control, section 8.6 (seen): A = [0 a; −a 0] − diag(1 + d1, 1 + d2)[1 a; −a 1] with a = 5.
const machine = {
  states: ['z0', 'z1'],
  dynamics: [
    ['-(1 + d1)', '5 - (1 + d1)*5'],
    ['-5 + (1 + d2)*5', '-(1 + d2)'],
  ],
};
const gain = (id: string) => ({ id, nominal: 0, low: -0.1, high: 0.1 });

describe('two gains at once', () => {
  it('are critical at d1 = −d2 = 1/√26', () => {
    // Derived: det A = (1 + d1)(1 + d2) + a² d1 d2 is 0 at 1 − δ² − a² δ² = 0.
    const { bandStretch, bands } = runStudy({ machine, parameters: [gain('d1'), gain('d2')] });
    const critical = 1 / Math.sqrt(26);
    expect(critical).toBeCloseTo(0.1961161, 7);
    expectLargest(bandStretch, critical / 0.1);
    const { d1, d2 } = bandStretch?.witness as { d1: number; d2: number };
    expect(Math.abs(d1)).toBeCloseTo(critical, 4);
    expect(d1 + d2).toBeCloseTo(0, 3);
    expect(bandStretch?.frequency).toBe(0);
    expect(bands).toEqual({ verdict: 'holds', proof: 'proved' });
  });

  it.each(['d1', 'd2'])('one at a time: %s alone may fall to −1', (id) => {
    // Derived: with the other at 0, det A = 1 + d and the trace is −(2 + d).
    const other = id === 'd1' ? 'd2' : 'd1';
    const { bandStretch } = runStudy({
      machine,
      parameters: [
        { id, nominal: 0, low: -0.5, high: 0.5 },
        { id: other, nominal: 0 },
      ],
    });
    expectLargest(bandStretch, 2);
    expect(bandStretch?.witness?.[id]).toBeCloseTo(-1, 2);
  });
});
