import { describe, expect, it } from 'vitest';
import { companionPlant, staticGain } from './support/companion-machine';
import { runStudy } from './support/run-study';
import { expectLargest } from './support/two-sided';

const degrees = Math.PI / 180;

describe('margins of 0.38(s² + 0.1s + 0.55)/(s(s + 1)(s² + 0.06s + 0.5))', () => {
  // Åström & Murray, Feedback Systems (seen).
  const machine = companionPlant([0.38, '0.38*0.1', '0.38*0.55'], [1, 1.06, 0.56, 0.5, 0]);
  const run = (requirements: object[]) =>
    runStudy({ machine, control: staticGain(1), parameters: [], requirements });
  const { nominal, bandStretch } = run([{ measure: 'stability' }]);

  it('has the phase margin 69.77°, printed as 70°', () => {
    // Recomputed: 69.77222° at 0.4057849 rad/s.
    expect((nominal.phaseMargin ?? NaN) / degrees).toBeCloseTo(69.77222, 4);
    expect(nominal.delayMargin).toBeCloseTo((69.77222 * degrees) / 0.4057849, 4);
  });

  it('has the modulus margin 0.27093, printed as 0.27', () => {
    // Recomputed: 0.2709289 at 0.7144556 rad/s.
    expect(nominal.modulusMargin).toBeCloseTo(0.2709289, 6);
  });

  it('has no finite upper gain margin', () => {
    // Printed. Downwards only factor 0 puts a pole on the axis (recomputed).
    expect(nominal.gainMargin).toEqual({ up: null, down: null });
  });

  it('keeps each margin as a requirement up to its value and no further', () => {
    expect(bandStretch).toBeNull();
    expect(run([{ measure: 'phaseMargin', atLeast: 69.77 * degrees }]).bands.verdict).toBe('holds');
    const phase = run([{ measure: 'phaseMargin', atLeast: 69.78 * degrees }]).bands;
    expect(phase).toMatchObject({ verdict: 'fails', requirement: 'phaseMargin' });
    expect(phase.frequency).toBeCloseTo(0.4057849, 5);
    expect(run([{ measure: 'modulusMargin', atLeast: 0.27092 }]).bands.verdict).toBe('holds');
    const modulus = run([{ measure: 'modulusMargin', atLeast: 0.27094 }]).bands;
    expect(modulus).toMatchObject({ verdict: 'fails', requirement: 'modulusMargin' });
    expect(modulus.frequency).toBeCloseTo(0.7144556, 5);
    expect(run([{ measure: 'gainMargin', atLeast: 100 }]).bands.verdict).toBe('holds');
  });
});

describe('margins of 25/(s³ + 10s² + 10s + 10)', () => {
  // Seiler, Packard & Gahinet 2020, IEEE Control Systems Magazine 40(5) (memory).
  const machine = companionPlant([25], [1, 10, 10, 10]);
  const largestGain = (requirement: object) =>
    runStudy({
      machine,
      control: staticGain('K'),
      parameters: [{ id: 'K', nominal: 0.1 }],
      payload: 'K',
      searchUpTo: 10,
      requirements: [{ measure: 'stability' }, requirement],
    }).largestPayload;

  it('are a factor of 3.6 and 29.1105°', () => {
    // From memory; the factor derived, (10·10 − 10)/25, the angle recomputed: 29.11037° at 1.784436 rad/s.
    const { nominal } = runStudy({ machine, control: staticGain(1), parameters: [] });
    expect(nominal.gainMargin?.up).toBeCloseTo(3.6, 6);
    expect((nominal.phaseMargin ?? NaN) / degrees).toBeCloseTo(29.11037, 4);
    expect(nominal.modulusMargin).toBeCloseTo(0.4021459, 6);
  });

  it('limit the gain where they are required', () => {
    // Derived from the margins: gain 3.6 in all; a gain margin of 2 leaves half of it; the phase margin of K = 1.
    expectLargest(largestGain({ measure: 'stability' }), 3.6);
    expectLargest(largestGain({ measure: 'gainMargin', atLeast: 2 }), 1.8);
    const phase = largestGain({ measure: 'phaseMargin', atLeast: 0.5080717877966721 });
    expectLargest(phase, 1);
    expect(phase).toMatchObject({ requirement: 'phaseMargin' });
    expect(phase?.frequency).toBeCloseTo(1.784436, 3);
    // Recomputed: abs(1 + K L) falls to 0.4021459 at K = 1 and to 0.5 at K = 0.7300257.
    expectLargest(largestGain({ measure: 'modulusMargin', atLeast: 0.4021458642240192 }), 1);
    expectLargest(largestGain({ measure: 'modulusMargin', atLeast: 0.5 }), 0.730025741921745);
  });

  // Derived: a sensitivity peak Ms guarantees a gain margin Ms/(Ms − 1) and a phase margin 2 asin(1/(2 Ms)).
  it.each([
    [2, 2, 28.96],
    [1.4, 3.5, 41.85],
  ])('with a sensitivity peak of at most %d are at least %d and %d°', (peak, factor, angle) => {
    const atPeak = largestGain({ measure: 'modulusMargin', atLeast: 1 / peak });
    const atAngle = largestGain({ measure: 'phaseMargin', atLeast: 2 * Math.asin(1 / (2 * peak)) });
    const atFactor = largestGain({ measure: 'gainMargin', atLeast: peak / (peak - 1) });
    expect(atPeak?.provedTo).toBeLessThan(atAngle?.failsAt ?? NaN);
    expect(atPeak?.provedTo).toBeLessThan(atFactor?.failsAt ?? NaN);
    const { nominal } = runStudy({
      machine,
      control: staticGain(atPeak?.provedTo ?? NaN),
      parameters: [],
    });
    expect(nominal.modulusMargin).toBeGreaterThanOrEqual(1 / peak);
    expect(nominal.gainMargin?.up).toBeGreaterThanOrEqual(factor);
    expect((nominal.phaseMargin ?? NaN) / degrees).toBeGreaterThanOrEqual(angle);
  });
});
