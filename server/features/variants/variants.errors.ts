import { defineProblem, notFound, type Problem } from '../../platform/problem';

const taken = defineProblem({
  code: 'variant-name-taken',
  status: 409,
  title: 'Another variant has this name',
});
const inUse = defineProblem({
  code: 'variant-in-use',
  status: 409,
  title: 'The variant holds runs or reviews',
});

export function variantNameTaken(name: string): Problem {
  return taken(`The product has a variant "${name}" already. Choose another name.`);
}

/** @param scenarios the names of those that were run or reviewed */
export function variantInUse(name: string, scenarios: readonly string[]): Problem {
  const names = scenarios.map((scenario) => `"${scenario}"`).join(', ');
  return inUse(
    `"${name}" holds scenarios that were run or reviewed: ${names}. Delete these first, one by one; ` +
      'scenarios that were never run go with the variant.',
  );
}

export const noVariant = () => notFound('There is no such variant, or it was deleted.');
export const noProduct = () => notFound('There is no such product, or it was deleted.');
