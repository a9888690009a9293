import { convertToParamMap } from '@angular/router';
import { describe, expect, it } from 'vitest';
import type { Study } from '../../../../../shared/contracts';
import { readMapChoice, usualChoice, writeMapChoice } from './map-choice';

const study: Study = {
  format: 'tareline-study',
  version: 1,
  machine: { template: 'mass-spring-damper' },
  parameters: [
    { id: 'M', nominal: 180 },
    { id: 'm', nominal: 300, low: 40, high: 480 },
    { id: 'k', nominal: 150, low: 120, high: 185 },
    { id: 'c', nominal: 620, low: 470, high: 800 },
  ],
  payload: 'm',
  requirements: [{ measure: 'stability' }],
};
const read = (query: Record<string, string>, of = study) => readMapChoice(convertToParamMap(query), of);

describe('the choice of a map', () => {
  it('is the payload against the first other band where nobody says anything', () => {
    expect(usualChoice(study)).toEqual({ x: 'm', y: 'k', measure: 'closest', others: 'nominal' });
  });

  it('is what the study asks for', () => {
    const asking: Study = { ...study, map: { x: 'k', y: 'c', measure: 'dampingRatio', others: 'anywhere' } };
    expect(read({}, asking)).toEqual({ x: 'k', y: 'c', measure: 'dampingRatio', others: 'anywhere' });
  });

  it('is what the address asks for, as far as the study has it', () => {
    expect(read({ y: 'c', measure: 'gainMargin' })).toMatchObject({ x: 'm', y: 'c', measure: 'gainMargin' });
    expect(read({ y: 'zeta', measure: 'beauty' })).toMatchObject({ x: 'm', y: 'k', measure: 'closest' });
  });

  it('never has one parameter on both axes', () => {
    expect(read({ x: 'k' })).toMatchObject({ x: 'k', y: 'm' });
    expect(read({ x: 'c', y: 'c' })).toMatchObject({ x: 'c', y: 'k' });
  });

  it('leaves out of the address what is usual', () => {
    const choice = { x: 'm', y: 'c', measure: 'closest', others: 'anywhere' } as const;
    expect(writeMapChoice(choice, study)).toEqual({ x: null, y: 'c', measure: null, others: 'anywhere' });
  });

  it('is none where there are not two parameters', () => {
    expect(read({}, { ...study, parameters: [study.parameters[0]] })).toBeUndefined();
  });
});
