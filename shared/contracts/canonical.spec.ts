import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { answerText, canonicalText } from './canonical';
import type { Study } from './study';
import { readStudyValue } from './study-text';

const study: Study = {
  format: 'tareline-study',
  version: 1,
  name: 'Seat',
  machine: { template: 'mass-spring-damper' },
  parameters: [{ id: 'm', label: 'Person', nominal: 75, low: 45.5, high: 1e21 }],
  control: { law: 'pid', input: 'u', output: 'q', kp: 1, ki: 0, kd: 'm/3' },
  requirements: [{ measure: 'stability' }],
  map: { x: 'm', y: 'k' },
};

describe('canonicalText', () => {
  it('sorts keys, drops white space and keys without a value', () => {
    expect(canonicalText({ ...study, payload: undefined })).toBe(
      '{"control":{"input":"u","kd":"m/3","ki":0,"kp":1,"law":"pid","output":"q"},"format":"tareline-study",' +
        '"machine":{"template":"mass-spring-damper"},"map":{"x":"m","y":"k"},"name":"Seat",' +
        '"parameters":[{"high":1e+21,"id":"m","label":"Person","low":45.5,"nominal":75}],' +
        '"requirements":[{"measure":"stability"}],"version":1}',
    );
  });

  it('does not depend on the order of keys', () => {
    const reversed = (value: unknown): unknown => {
      if (Array.isArray(value)) return value.map(reversed);
      if (typeof value !== 'object' || value === null) return value;
      return Object.fromEntries(
        Object.entries(value)
          .reverse()
          .map(([key, entry]) => [key, reversed(entry)]),
      );
    };
    const { map, ...rest } = study;
    const readable = { ...rest, definitions: { b: 1, a: 2 } };
    expect(map).toBeDefined();
    expect(canonicalText(readStudyValue(reversed(readable)).study)).toBe(canonicalText(readable));
  });

  it('keeps every double to the last bit', () => {
    fc.assert(
      fc.property(fc.double({ noNaN: true, noDefaultInfinity: true }), (nominal) => {
        const text = canonicalText({ ...study, parameters: [{ id: 'm', nominal }] });
        const { parameters } = JSON.parse(text) as Study;
        expect(parameters[0].nominal).toBe(nominal + 0);
      }),
    );
  });
});

describe('answerText', () => {
  it('leaves out name, labels and map, and nothing else', () => {
    const bare = {
      ...study,
      name: undefined,
      map: undefined,
      parameters: [{ id: 'm', nominal: 75, low: 45.5, high: 1e21 }],
    };
    expect(answerText(study)).toBe(canonicalText(bare));
    expect(answerText({ ...study, name: 'Other', map: undefined })).toBe(answerText(study));
    expect(answerText({ ...study, payload: 'm' })).not.toBe(answerText(study));
  });
});
