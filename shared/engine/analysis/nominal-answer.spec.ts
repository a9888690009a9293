import { describe, expect, it } from 'vitest';
import { readStudyValue } from '../../contracts';
import { composeStudy } from '../study';
import { analyse } from './analyse';

function nominalOf(stiffness: number, damping: number) {
  const study = {
    format: 'tareline-study',
    version: 1,
    machine: {
      coordinates: ['a', 'b'],
      mass: [
        [2, 0],
        [0, 7],
      ],
      damping: [
        [damping, -damping],
        [-damping, damping],
      ],
      stiffness: [
        [stiffness, -stiffness],
        [-stiffness, stiffness],
      ],
    },
    parameters: [{ id: 'm', nominal: 1, low: 0.5, high: 2 }],
    requirements: [{ measure: 'stability' }],
  };
  const options = { studyHash: '', clock: () => 0, map: false };
  return analyse(composeStudy(readStudyValue(study).study), options);
}

describe('nominal answer', () => {
  it('has the poles of a free machine exactly at 0, whatever rounding made of them', () => {
    const { nominal, bands } = nominalOf(1000, 3);
    expect(nominal.stable).toBe(false);
    expect(nominal.poles.filter(({ re, im }) => re === 0 && im === 0)).toHaveLength(2);
    expect(nominal).toMatchObject({ decayRate: 0, dampingRatio: 0, gainMargin: null, modulusMargin: null });
    expect(bands.verdict).toBe('fails');
  });

  it('calls an undamped machine unstable: a pole on the axis is not inside', () => {
    const { nominal, bandStretch } = nominalOf(1000, 0);
    expect(nominal.stable).toBe(false);
    expect(bandStretch).toMatchObject({ provedTo: null, failsAt: 0 });
  });
});
