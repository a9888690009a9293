import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { readStudyValue } from '../../shared/contracts';
import { analyse, composeStudy } from '../../shared/engine';
import type { LiveAnswer } from '../../src/app/engine/live-answer';
import { liveCourse } from '../../src/app/engine/worker/live-course';

const folder = join(import.meta.dirname, '..', '..', 'examples');
const files = readdirSync(folder, { recursive: true, encoding: 'utf8' })
  .filter((file) => file.endsWith('.json'))
  .sort();

/** The server's hash and the count of boxes are not the live answer's. */
function digits(result: object): string {
  return JSON.stringify({ ...result, work: undefined, studyHash: undefined });
}

it('finds the examples, those of the demo among them', () => {
  expect(files.filter((file) => file.startsWith('demo')).length).toBeGreaterThanOrEqual(5);
  expect(files.length).toBeGreaterThanOrEqual(15);
});

describe.each(files)('live answers to %s', (file) => {
  const value: unknown = JSON.parse(readFileSync(join(folder, file), 'utf8'));
  const { study, warnings } = readStudyValue(value);
  const whole = analyse(composeStudy(study), { studyHash: '', clock: () => 0, map: false });
  const answers: LiveAnswer[] = [];
  for (
    const course = liveCourse(
      value,
      () => 0,
      (answer) => answers.push(answer),
    );
    !course.next().done;
  );
  const results = answers.flatMap((answer) => ('result' in answer ? [answer] : []));

  it('end with the digits of the whole analysis', () => {
    expect(results.map(({ complete }) => complete)).toEqual([...results.slice(1).map(() => false), true]);
    const all = [...warnings, ...(whole.warnings ?? [])];
    expect(digits(results[results.length - 1].result)).toBe(
      digits(all.length === 0 ? whole : { ...whole, warnings: all }),
    );
  });

  it('begin with answers that the whole analysis has too', () => {
    const [{ result: first }] = results;
    const { result: rated } = results[results.length - 2];
    expect(first.nominal).toEqual(whole.nominal);
    expect(first.largestPayload).toEqual(whole.largestPayload);
    expect(rated.rating).toEqual(whole.rating);
    expect([whole.bands.verdict, 'undecided']).toContain(first.bands?.verdict);
  });
});
