import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { ratingAnswer } from './rating-answer';

describe('rating', () => {
  it('takes the least of the requirements and the tests, and rounds the plate down to its step', () => {
    const limits = [
      { name: null, factor: 1, provedTo: 571.2 },
      { name: 'dynamic', factor: 1.1, provedTo: 571.2 },
      { name: 'static', factor: 1.25, provedTo: 571.2 },
    ];
    const answer = ratingAnswer(limits, 25);
    expect(answer.allowed).toBeCloseTo(456.96, 10);
    expect(answer).toMatchObject({ plate: 450, limitedBy: 'static' });
  });

  it('names no test where the requirements themselves limit', () => {
    const limits = [
      { name: null, factor: 1, provedTo: 300 },
      { name: 'static', factor: 1.25, provedTo: 900 },
    ];
    expect(ratingAnswer(limits, undefined)).toEqual({ allowed: 300, plate: 300, limitedBy: null });
  });

  it('allows nothing where a test is not proved at all', () => {
    const limits = [
      { name: null, factor: 1, provedTo: 300 },
      { name: 'static', factor: 1.25, provedTo: null },
    ];
    expect(ratingAnswer(limits, 25)).toEqual({ allowed: null, plate: null, limitedBy: 'static' });
  });

  it('never allows more than factor · payload ≤ proved, nor a plate above it', () => {
    const positive = fc.double({ min: 1e-3, max: 1e6, noNaN: true });
    fc.assert(
      fc.property(
        positive,
        fc.double({ min: 1, max: 3, noNaN: true }),
        positive,
        (provedTo, factor, step) => {
          const { allowed, plate } = ratingAnswer([{ name: 'test', factor, provedTo }], step);
          expect((allowed ?? 0) * factor).toBeLessThanOrEqual(provedTo);
          expect(plate).toBeLessThanOrEqual(allowed ?? 0);
          expect((allowed ?? 0) - (plate ?? 0)).toBeLessThan(step * (1 + 1e-9));
        },
      ),
    );
  });
});
