import { defineProblem, notFound, type Problem } from '../../platform/problem';

const over = defineProblem({ code: 'run-over', status: 409, title: 'The run is over' });
const overtaken = defineProblem({
  code: 'preview-superseded',
  status: 409,
  title: 'A newer preview has taken the place of this one',
});
const tooLong = defineProblem({
  code: 'preview-too-long',
  status: 422,
  title: 'This takes longer than a preview may',
});
const tooMany = defineProblem({
  code: 'too-many-at-once',
  status: 429,
  title: 'Too much is asked for at once',
});

export const noRevision = () => notFound('The scenario has no such revision.');
export const noRun = () => notFound('There is no such run.');
export const noMap = () => notFound('The run has no map, or is not done.');

export function runIsOver(state: string): Problem {
  return over(`It is ${state}; only a run that waits or computes can be cancelled.`);
}

export const previewSuperseded = () =>
  overtaken('Its answer would be out of date; wait for that of the newer one.');
export const previewTooLong = () => tooLong('Save the scenario and start a run.');
export const tooManyPreviews = (most: number) =>
  tooMany(`At most ${most} previews of one person are computed at a time.`);
export const tooManyStreams = (most: number) =>
  tooMany(`At most ${most} windows of one browser follow the runs at a time.`);
