import { beforeAll, describe, expect, it } from 'vitest';
import { type AttackReport, attackShare } from './support/attack-share';

/** The other half of `attack.spec.ts`. */
describe('random machines, even seeds', () => {
  let report: AttackReport;

  beforeAll(() => {
    report = attackShare(0, 2);
  }, 3_600_000);

  it('hold no failing point in what is proved, fail at every witness, and agree at the nominal point', () => {
    expect(report.faults).toEqual([]);
  });

  it('are decided but for a few', () => {
    expect(report.statistics.undecidedShare, report.statistics.summary).toBeLessThan(0.03);
  });
});
