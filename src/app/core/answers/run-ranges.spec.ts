import { describe, expect, it } from 'vitest';
import type { RunSummary } from '../../../../shared/contracts/api';
import { provedText, rangesInWords, rangesOfRun, reserveOf } from './run-ranges';

const run: RunSummary = {
  id: '5f2b3a1e-7f7f-4a53-9d1b-0c5a2f4e9a01',
  state: 'done',
  at: '2025-11-30T12:04:00.000Z',
  unit: 'kg',
  verdict: 'holds',
  proof: 'proved',
  approximated: false,
  ratedLow: 40,
  ratedHigh: 480,
  provedLow: 0,
  provedHigh: 571.26,
  failsAt: 572.31,
  failsBelow: null,
  plate: 450,
  limiting: 'dampingRatio',
};

describe('rangesOfRun', () => {
  it('has nothing to show before there is an answer', () => {
    expect(rangesOfRun(null)).toBeUndefined();
    expect(rangesOfRun({ ...run, state: 'queued', verdict: null })).toBeUndefined();
  });

  it('shows the failing points beyond both ends', () => {
    expect(rangesOfRun(run)).toMatchObject({ failsAbove: 572.31, failsBelow: undefined });
    const light = rangesOfRun({ ...run, verdict: 'fails', provedLow: 85, failsBelow: 84.92 });
    expect(light).toMatchObject({ failsAbove: 572.31, failsBelow: 84.92 });
    expect(rangesInWords(light ?? {}, 'kg')).toContain('fails at 84.9');
  });
});

describe('reserveOf', () => {
  it('is the distance at the heavy end where the light end is proved from 0 on', () => {
    expect(reserveOf({ rated: { low: 40, high: 480 }, proved: { low: 0, high: 571 } })).toBe(91);
  });

  it('is the smaller of both ends', () => {
    const rated = { low: 40, high: 480 };
    expect(reserveOf({ rated, proved: { low: 85, high: 497 }, failsBelow: 84, failsAbove: 498 })).toBe(-45);
    expect(reserveOf({ rated, proved: { low: 38, high: 600 } })).toBe(2);
  });

  it('is open where nothing is rated or proved', () => {
    expect(reserveOf({ rated: { low: 40, high: 480 } })).toBeUndefined();
  });
});

describe('words of a ladder bar', () => {
  it('round into the proved range', () => {
    const ranges = rangesOfRun(run) ?? {};
    expect(provedText(ranges)).toBe('0\u2013571.2');
    expect(rangesInWords(ranges, 'kg')).toBe(
      'Proved 0 to 571.2\u2009kg; rated 40 to 480\u2009kg; fails at 572.4\u2009kg.',
    );
  });
});
