import { describe, expect, it } from 'vitest';
import type { Study } from '../../../../../shared/contracts';
import { controlFacts, machineText, ratingFacts, requirementFacts } from './study-text';

const study: Study = {
  format: 'tareline-study',
  version: 1,
  machine: { template: 'two-mass-drive' },
  parameters: [{ id: 'm', unit: 'kg', nominal: 300 }],
  payload: 'm',
  control: { law: 'pid', input: 'u', output: 'drive', kp: 9400, ki: '2*k', kd: 4100 },
  actuator: { lag: 'tau' },
  sampling: { period: 0.005 },
  rating: { payload: 480, step: 25, tests: [{ name: 'static', factor: 1.25 }] },
  requirements: [{ measure: 'stability' }, { measure: 'decayRate', atLeast: 0.8 }],
};

describe('study in words', () => {
  it('names the machine by its template', () => {
    expect(machineText(study)).not.toBe('two-mass-drive');
  });

  it('shows gains as numbers or as they were written', () => {
    expect(controlFacts(study)).toEqual([
      { label: 'PID', text: 'drive to u' },
      { label: 'Proportional', text: '9400' },
      { label: 'Integral', text: '2*k' },
      { label: 'Derivative', text: '4100' },
      { label: 'Sampling period', text: '0.005\u2009s' },
      { label: 'Drive lag', text: 'tau' },
    ]);
  });

  it('shows requirements and rating with their units', () => {
    expect(requirementFacts(study.requirements)).toEqual([
      { label: 'Stability', text: 'required' },
      { label: 'Decay rate', text: '≥ 0.8\u20091/s' },
    ]);
    expect(ratingFacts(study)).toEqual([
      { label: 'Rated payload', text: '480\u2009kg' },
      { label: 'Plate step', text: '25\u2009kg' },
      { label: 'Test, static', text: '× 1.25' },
    ]);
  });
});
