import { expect } from 'vitest';
import type { Result } from '../../../shared/contracts';

/** Both sides of an answer may lie this far apart, of the larger of the value and the nominal. */
const WIDEST_GAP = 0.002;

type Upward = Result['largestPayload'];
type Downward = Result['smallestPayload'];

interface Sides {
  readonly proved: number;
  readonly fails: number;
}

/** Both sides as numbers; the test ends here where one is missing. */
function sides(answer: Upward | Downward): Sides {
  expect(answer).not.toBeNull();
  expect(answer).toMatchObject({
    provedTo: expect.any(Number) as number,
    failsAt: expect.any(Number) as number,
  });
  return { proved: answer?.provedTo ?? NaN, fails: answer?.failsAt ?? NaN };
}

/** Proved up to a value, failing at another, the true limit in between and both near it. */
export function expectLargest(answer: Upward, limit: number, nominal = 0): void {
  const { proved, fails } = sides(answer);
  expect(answer).toMatchObject({ proof: 'proved' });
  expect(answer).not.toHaveProperty('undecided');
  expect(proved).toBeLessThanOrEqual(limit);
  expect(fails).toBeGreaterThanOrEqual(limit);
  expect(fails - proved).toBeLessThanOrEqual(WIDEST_GAP * Math.max(fails, nominal));
}

/** The same for an answer towards smaller values. */
export function expectSmallest(answer: Downward, limit: number, nominal = 0): void {
  const { proved, fails } = sides(answer);
  expect(answer).toMatchObject({ proof: 'proved' });
  expect(answer).not.toHaveProperty('undecided');
  expect(proved).toBeGreaterThanOrEqual(limit);
  expect(fails).toBeLessThanOrEqual(limit);
  expect(proved - fails).toBeLessThanOrEqual(WIDEST_GAP * Math.max(proved, nominal));
}

/** Each named value of the failing point lies near the stated one. */
export function expectWitness(
  answer: { readonly witness?: Readonly<Record<string, number>> | undefined } | null,
  point: Readonly<Record<string, number>>,
  tolerance = 2e-3,
): void {
  for (const [id, value] of Object.entries(point)) {
    const actual = answer?.witness?.[id] ?? NaN;
    expect(Math.abs(actual - value), `${id}: ${actual}, not ${value}`).toBeLessThanOrEqual(
      tolerance * Math.abs(value),
    );
  }
}
