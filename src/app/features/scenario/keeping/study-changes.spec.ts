import { describe, expect, it } from 'vitest';
import { studyChanges } from './study-changes';

const base = {
  parameters: [
    { id: 'm', low: 40, high: 480 },
    { id: 'k', low: 128, high: 185 },
  ],
  requirements: [{ measure: 'dampingRatio', atLeast: 0.15 }],
};

describe('studyChanges', () => {
  it('finds nothing in equal studies', () => {
    expect(studyChanges(base, structuredClone(base))).toEqual([]);
  });

  it('names the changed band by its parameter', () => {
    const after = structuredClone(base);
    after.parameters[1].low = 120;
    expect(studyChanges(base, after)).toEqual([{ path: 'parameters.k.low', before: '128', after: '120' }]);
  });

  it('takes an inserted parameter as one change', () => {
    const after = { ...base, parameters: [{ id: 'c', low: 1, high: 2 }, ...base.parameters] };
    expect(studyChanges(base, after)).toEqual([
      { path: 'parameters.c', before: undefined, after: '{"id":"c","low":1,"high":2}' },
    ]);
  });

  it('shows what was taken away', () => {
    expect(studyChanges(base, { ...base, requirements: [] })).toEqual([
      {
        path: 'requirements.dampingRatio',
        before: '{"measure":"dampingRatio","atLeast":0.15}',
        after: undefined,
      },
    ]);
  });
});
