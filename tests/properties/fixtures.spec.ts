import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { analyseValue } from './support/analyse-value';

const analysed = (name: string) =>
  analyseValue(
    JSON.parse(readFileSync(join(import.meta.dirname, 'fixtures', `${name}.json`), 'utf8')) as object,
  );

/** Studies of random machines that were answered wrongly, not at all, or with far too much work once. */
describe('studies that went wrong once', () => {
  it('a pole reaches the origin where the payload is 0: fails there, instead of being split without end', () => {
    const { smallestPayload, work } = analysed('pole-at-origin-without-payload');
    expect(smallestPayload?.failsAt).toBe(0);
    expect(smallestPayload?.provedTo).toBeGreaterThan(0);
    expect(smallestPayload?.provedTo).toBeLessThan(0.002 * 18.894);
    expect(work.boxes).toBeLessThan(500);
  });

  it('a phase margin near a half turn with a small loop gain: decided, the turns need not share one direction', () => {
    const { bandStretch, work } = analysed('wide-phase-margin');
    expect(bandStretch?.undecided).toBeUndefined();
    expect(bandStretch?.provedTo).toBeGreaterThan(1.3);
    expect(work.boxes).toBeLessThan(1000);
  });

  it('a wide range of gains: decided, the gains need not share one direction', () => {
    const { bandStretch, work } = analysed('wide-gain-margin');
    expect(bandStretch?.undecided).toBeUndefined();
    expect(bandStretch?.provedTo).toBeGreaterThan(3.4);
    expect(work.boxes).toBeLessThan(5000);
  });

  it('an ideal derivative of a signal behind a sensor delay has a proper form', () => {
    const { nominal } = analysed('ideal-derivative-behind-delay');
    expect(nominal.stable).toBe(true);
    expect(nominal.poles).toHaveLength(7);
  });

  it('a search whose end does not convert without rounding: proved to the end itself', () => {
    const { largestPayload } = analysed('search-end-in-tonnes');
    expect(largestPayload?.failsAt).toBeNull();
    expect(largestPayload?.provedTo).toBe(largestPayload?.searchedUpTo);
  });
});
