import { defineProblem, notFound, type Problem } from '../../platform/problem';

const overtaken = defineProblem({
  code: 'scenario-changed',
  status: 409,
  title: 'The scenario has a newer revision',
});
const draftElsewhere = defineProblem({
  code: 'draft-changed',
  status: 409,
  title: 'The draft was changed elsewhere',
});
const baseUnknown = defineProblem({
  code: 'base-revision-unknown',
  status: 422,
  title: 'The draft begins from a revision that does not exist',
});
const taken = defineProblem({
  code: 'scenario-name-taken',
  status: 409,
  title: 'Another scenario has this name',
});
const reviewed = defineProblem({
  code: 'scenario-under-review',
  status: 409,
  title: 'A review stands on this scenario',
});

/** @param current the head of the scenario, @param sent what was to be saved on top of an older one */
export function scenarioChanged(current: { number: number; author: string }, sent: unknown): Problem {
  const { number, author } = current;
  const detail = `${author} saved revision ${number} meanwhile. Nothing of yours was saved yet, nor lost.`;
  return overtaken(detail, { current, sent });
}

/** @param current the draft as it is kept now, null where it is gone, @param sent what was to be kept */
export function draftChanged(current: object | null, sent: unknown): Problem {
  const detail =
    current === null
      ? 'The draft was saved as a revision or discarded in another window.'
      : 'Another window saved this draft meanwhile.';
  return draftElsewhere(detail, { current, sent });
}

export function baseRevisionUnknown(baseRevision: number): Problem {
  return baseUnknown(`The scenario has no revision ${baseRevision}.`);
}

export function scenarioNameTaken(name: string): Problem {
  return taken(`The variant has a scenario "${name}" already. Choose another name.`);
}

export function scenarioUnderReview(name: string): Problem {
  return reviewed(
    `"${name}" is approved, or waits for a reviewer. Withdraw or return the review first; then delete it.`,
  );
}

export const noScenario = () => notFound('There is no such scenario, or it was deleted.');
export const noRevision = () => notFound('The scenario has no such revision.');
export const noVariant = () => notFound('There is no such variant, or it was deleted.');
