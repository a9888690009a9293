import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { BinaryValue } from '../elementary/testing/fixed-point-oracle';
import {
  binaryValue,
  exactCos,
  exactExp,
  exactLog,
  exactSin,
  exactTan,
} from '../elementary/testing/fixed-point-oracle';
import { cos } from './cos';
import type { DomainIssue } from './domain-issue';
import { isDomainIssue } from './domain-issue';
import { exp } from './exp';
import type { Interval } from './interval';
import { log } from './log';
import { nextUp } from './rounding';
import { sin } from './sin';
import { tan } from './tan';
import { intervalAndPoint, partWay } from './testing/interval-and-point';
import { encloses } from './testing/containment';

/** Both by density of doubles, which crowds towards 0, and by length. */
const endIn = (min: number, max: number) =>
  fc.oneof(
    fc.double({ min, max, noNaN: true }),
    fc.double({ min: 0, max: 1, noNaN: true }).map((part) => partWay(min, max, part)),
  );
const intervalIn = (min: number, max: number) =>
  fc
    .tuple(endIn(min, max), endIn(min, max), fc.double({ min: 0, max: 1, noNaN: true }))
    .map(intervalAndPoint);

type Enclosure = (x: Interval) => Interval | DomainIssue;

/** How many of 800 random intervals had an enclosure; each is checked at both ends and at a point. */
function enclosed(f: Enclosure, exact: (x: number) => BinaryValue, low: number, high: number): number {
  let count = 0;
  fc.assert(
    fc.property(intervalIn(low, high), ({ x, point }) => {
      const image = f(x);
      if (isDomainIssue(image)) return;
      count += 1;
      for (const at of [x.low, point, x.high]) {
        // The reference is in fixed point and has too few digits of smaller arguments.
        if (at !== 0 && Math.abs(at) < 1e-40) continue;
        expect(encloses(image, exact(at)), `${at} of [${x.low}, ${x.high}]`).toBe(true);
      }
    }),
    { seed: 4, numRuns: 800 },
  );
  return count;
}

describe('elementary functions of intervals', () => {
  it('enclose the values at points', () => {
    expect(enclosed(sin, exactSin, -4, 4)).toBe(800);
    expect(enclosed(sin, exactSin, 1e6, 1e6 + 3)).toBe(800);
    expect(enclosed(sin, exactSin, 1e15, 1e15 + 8)).toBe(800);
    expect(enclosed(cos, exactCos, -4, 4)).toBe(800);
    expect(enclosed(cos, exactCos, -1e6, 3 - 1e6)).toBe(800);
    expect(enclosed(tan, exactTan, -4, 4)).toBeGreaterThan(200);
    expect(enclosed(tan, exactTan, 1000, 1001)).toBeGreaterThan(200);
    expect(enclosed(exp, exactExp, -740, 709)).toBe(800);
    expect(enclosed(exp, exactExp, -1, 1)).toBe(800);
    expect(enclosed(log, exactLog, 1e-300, 1e300)).toBe(800);
    expect(enclosed(log, exactLog, 0.9, 1.1)).toBe(800);
  });

  it('are tight at points and exact where the value is', () => {
    for (const f of [sin, cos, tan, exp] as Enclosure[]) {
      const image = f({ low: 0.7, high: 0.7 });
      if (isDomainIssue(image)) throw new Error('0.7 is in every domain');
      expect(image.high - image.low).toBeLessThan(7 * (nextUp(image.low) - image.low));
    }
    expect(sin({ low: 0, high: 0 })).toEqual({ low: 0, high: 0 });
    expect(cos({ low: 0, high: 0 })).toEqual({ low: 1, high: 1 });
    expect(tan({ low: 0, high: 0 })).toEqual({ low: 0, high: 0 });
    expect(exp({ low: 0, high: 0 })).toEqual({ low: 1, high: 1 });
    expect(log({ low: 1, high: 1 })).toEqual({ low: 0, high: 0 });
  });

  it('find the extrema of sine and cosine inside', () => {
    expect(sin({ low: 1, high: 2 }).high).toBe(1);
    expect(sin({ low: 1, high: 2 }).low).toBeCloseTo(0.8415, 4);
    expect(sin({ low: 4, high: 5 }).low).toBe(-1);
    expect(sin({ low: -2, high: -1 }).low).toBe(-1);
    expect(sin({ low: -2, high: -1 }).high).toBeLessThan(-0.8);
    expect(sin({ low: 1, high: 5 })).toEqual({ low: -1, high: 1 });
    expect(cos({ low: -0.5, high: 1 }).high).toBe(1);
    expect(cos({ low: 3, high: 3.2 }).low).toBe(-1);
    expect(cos({ low: -3.2, high: -3 }).low).toBe(-1);
    expect(cos({ low: 3, high: 3.2 }).high).toBeLessThan(-0.98);
    expect(sin({ low: 0.1, high: 0.2 }).high).toBeLessThan(0.1987);
    expect(sin({ low: -Infinity, high: 0 })).toEqual({ low: -1, high: 1 });
    expect(cos({ low: 1e300, high: nextUp(1e300) })).toEqual({ low: -1, high: 1 });
  });

  it('report what they cannot enclose', () => {
    expect(tan({ low: 1, high: 2 })).toEqual({ cause: 'pole-of-tangent', everywhere: false });
    expect(tan({ low: -Infinity, high: 0 })).toEqual({ cause: 'pole-of-tangent', everywhere: false });
    expect(isDomainIssue(tan({ low: -1.57, high: 1.57 }))).toBe(false);
    expect(isDomainIssue(tan({ low: 1.58, high: 4.71 }))).toBe(false);
    expect(log({ low: 0, high: 1 })).toEqual({ cause: 'logarithm-of-nonpositive', everywhere: false });
    expect(log({ low: -1, high: 0 })).toEqual({ cause: 'logarithm-of-nonpositive', everywhere: true });
  });

  it('bound values beyond the range of doubles', () => {
    const large = exp({ low: 800, high: 900 });
    expect(large.low).toBeGreaterThan(1.79e308);
    expect(large.low).toBeLessThan(Infinity);
    expect(large.high).toBe(Infinity);
    const small = exp({ low: -Infinity, high: -800 });
    expect(small.low).toBe(0);
    expect(small.high).toBeGreaterThan(0);
    expect(log({ low: 1, high: Infinity })).toEqual({ low: 0, high: Infinity });
    expect(encloses(exp({ low: -745, high: -745 }), exactExp(-745))).toBe(true);
    const least = log({ low: 5e-324, high: 1 });
    expect(!isDomainIssue(least) && encloses(least, exactLog(5e-324))).toBe(true);
    expect(encloses(sin({ low: 5e-324, high: 5e-324 }), binaryValue(5e-324))).toBe(true);
  });
});
