import { describe, expect, it } from 'vitest';
import type { Study } from '../../../../../shared/contracts';
import { withBandEnd } from './band-edits';

const study: Study = {
  format: 'tareline-study',
  version: 1,
  machine: { template: 'mass-spring-damper' },
  parameters: [
    { id: 'm', unit: 'kg', nominal: 300, low: 40, high: 480, minimum: 0, kind: 'use' },
    { id: 'k', unit: 'kN/m', nominal: '300/2', low: 120, high: 185, maximum: 200 },
  ],
  payload: 'm',
  searchUpTo: 600,
  requirements: [{ measure: 'stability' }],
};

const bandOf = (changed: Study, id: string) => {
  const parameter = changed.parameters.find((candidate) => candidate.id === id);
  return [parameter?.low, parameter?.high];
};

describe('withBandEnd', () => {
  it('moves one end and leaves the study it came from alone', () => {
    expect(bandOf(withBandEnd(study, 'k', 'low', 130), 'k')).toEqual([130, 185]);
    expect(bandOf(study, 'k')).toEqual([120, 185]);
  });

  it('stops at the nominal value, also where that is an expression', () => {
    expect(bandOf(withBandEnd(study, 'k', 'low', 170), 'k')).toEqual([150, 185]);
    expect(bandOf(withBandEnd(study, 'k', 'high', 100), 'k')).toEqual([120, 150]);
  });

  it('stops at the physical ends', () => {
    expect(bandOf(withBandEnd(study, 'm', 'low', -5), 'm')).toEqual([0, 480]);
    expect(bandOf(withBandEnd(study, 'k', 'high', 240), 'k')).toEqual([120, 200]);
  });

  it('lets the search reach as far as the payload band', () => {
    expect(withBandEnd(study, 'm', 'high', 700).searchUpTo).toBe(700);
    expect(withBandEnd(study, 'm', 'high', 500).searchUpTo).toBe(600);
  });
});
