import { describe, expect, it } from 'vitest';
import type { Result } from '../../shared/contracts';
import { analyse, analyseInSteps, type ComposedStudy } from '../../shared/engine';
import { companionMachine } from './support/companion-machine';
import { composed, type StudyDraft } from './support/run-study';

const liftTable: StudyDraft = {
  machine: { template: 'two-mass-drive' },
  parameters: [
    { id: 'm', nominal: 300, low: 40, high: 480, minimum: 0, unit: 'kg', kind: 'use' },
    { id: 'k', nominal: 150, low: 120, high: 185, minimum: 0, unit: 'kN/m' },
    { id: 'c', nominal: 620, low: 470, high: 800, minimum: 0 },
    { id: 'tau', nominal: 8, low: 5, high: 11, minimum: 0.1, unit: 'ms' },
    { id: 'M', nominal: 180 },
    { id: 'm0', nominal: 120 },
    { id: 'b', nominal: 0 },
  ],
  payload: 'm',
  searchUpTo: 2400,
  control: {
    law: 'pid',
    input: 'u',
    output: 'drive',
    kp: 9400,
    ki: 11000,
    kd: 4100,
    derivativeTime: 0.002,
  },
  actuator: { lag: 'tau', delay: 0.001 },
  requirements: [
    { measure: 'stability' },
    { measure: 'dampingRatio', atLeast: 0.1 },
    { measure: 'phaseMargin', atLeast: 0.5 },
    { measure: 'modulusMargin', atLeast: 0.4 },
  ],
  rating: {
    payload: 400,
    step: 25,
    tests: [{ name: 'static', factor: 1.25, requirements: [{ measure: 'stability' }] }],
  },
  map: { x: 'm', y: 'k', columns: 9, rows: 7, measure: 'closest', others: 'anywhere' },
};
const island: StudyDraft = {
  machine: companionMachine([1, 'q1 + q2 + 1', 'q1 + q2 + 3', '1.25 + 6*q1 + 6*q2 + 2*q1*q2']),
  parameters: [
    { id: 'q1', nominal: 2, low: 1, high: 3 },
    { id: 'q2', nominal: 1, low: 0, high: 2 },
  ],
  map: { x: 'q1', y: 'q2', columns: 11, rows: 11, measure: 'decayRate', others: 'nominal' },
};
/** Not rational in the tolerance, so that it is sampled. */
const sampled: StudyDraft = {
  machine: { coordinates: ['q'], mass: [['m']], damping: [['0.3 - 0.1*sin(a)*m']], stiffness: [[4]] },
  parameters: [
    { id: 'm', nominal: 1, low: 0.5, high: 1.5, minimum: 0 },
    { id: 'a', nominal: 0.4, low: 0.2, high: 0.9 },
  ],
  payload: 'm',
  searchUpTo: 20,
};
const studies: [string, StudyDraft][] = [
  ['a proved study with margins, a rating and a map', liftTable],
  ['an island of failing points', island],
  ['a sampled study', sampled],
];

const options = { studyHash: 'sha256:', clock: () => 0, map: true };
type Course = Generator<void, Result>;

/** Resumes a course at most `steps` times; its result once it has come to an end. */
function advance(course: Course, steps: number): Result | undefined {
  for (let i = 0; i < steps; i++) {
    const { done, value } = course.next();
    if (done === true) return value;
  }
  return undefined;
}

/** Park & Miller's generator: whole numbers from 1 to `most`, the same on every run. */
function chunkSizes(seed: number, most: number): () => number {
  let state = seed;
  return () => {
    state = (state * 48271) % 2147483647;
    return 1 + (state % most);
  };
}

const whole = (study: ComposedStudy): string => JSON.stringify(analyse(study, options));

describe.each(studies)('%s', (_, draft) => {
  const expected = whole(composed(draft));

  it('has something in it to compare', () => {
    const result = JSON.parse(expected) as Result;
    expect(result.bandStretch?.failsAt).toBeGreaterThan(0);
    expect(result.work.boxes).toBeGreaterThan(0);
  });

  it('gives the same result again, from the same study and from one composed anew', () => {
    const study = composed(draft);
    expect(whole(study)).toBe(expected);
    expect(whole(study)).toBe(expected);
    expect(whole(composed(draft))).toBe(expected);
  });

  it('gives the same result one step at a time', () => {
    const course = analyseInSteps(composed(draft), options);
    let steps = 0;
    let result: Result | undefined;
    while (result === undefined) {
      result = advance(course, 1);
      steps++;
    }
    expect(steps).toBeGreaterThan(10);
    expect(JSON.stringify(result)).toBe(expected);
  });

  it.each([1, 20260, 77])('gives the same result in chunks of random sizes, seed %d', (seed) => {
    const next = chunkSizes(seed, 50);
    const course = analyseInSteps(composed(draft), options);
    let result: Result | undefined;
    while (result === undefined) result = advance(course, next());
    expect(JSON.stringify(result)).toBe(expected);
  });

  it.each(studies)('gives the same result in turns with %s', (_other, other) => {
    const study = composed(draft);
    const next = chunkSizes(4711, 7);
    const courses = [
      analyseInSteps(study, options),
      analyseInSteps(composed(other), options),
      // A second analysis of the very same composed study shares all that the composition holds.
      analyseInSteps(study, options),
    ];
    const results: (Result | undefined)[] = courses.map(() => undefined);
    while (results.includes(undefined)) {
      courses.forEach((course, i) => (results[i] ??= advance(course, next())));
    }
    const texts = results.map((result) => JSON.stringify(result));
    expect(texts).toEqual([expected, whole(composed(other)), expected]);
  });

  it('depends on the clock in its milliseconds alone', () => {
    let now = 1000;
    const clock = (): number => (now += 17);
    const { work, ...rest } = analyse(composed(draft), { ...options, clock });
    const { work: still, ...same } = JSON.parse(expected) as Result;
    expect(work.milliseconds).toBeGreaterThan(0);
    expect(work.boxes).toBe(still.boxes);
    expect(JSON.stringify(rest)).toBe(JSON.stringify(same));
  });
});
