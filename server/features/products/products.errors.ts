import { defineProblem, notFound, type Problem } from '../../platform/problem';

const taken = defineProblem({
  code: 'product-name-taken',
  status: 409,
  title: 'Another product has this name',
});
const inUse = defineProblem({
  code: 'product-in-use',
  status: 409,
  title: 'The product holds runs or reviews',
});
const designerless = defineProblem({
  code: 'last-designer',
  status: 409,
  title: 'The product would have no designer',
});
const disabled = defineProblem({
  code: 'person-disabled',
  status: 409,
  title: 'The person cannot sign in any more',
});

export function productNameTaken(name: string): Problem {
  return taken(`There is a product "${name}" already. Choose another name.`);
}

/** @param scenarios those that were run, each with its variant, as people read them */
export function productInUse(name: string, scenarios: readonly string[]): Problem {
  return inUse(
    `"${name}" holds scenarios that were run or reviewed: ${scenarios.join(', ')}. Delete these first, one by ` +
      'one; what was never run goes with the product.',
  );
}

export function lastDesigner(name: string): Problem {
  return designerless(
    `${name} is the only designer of the product who can sign in. Make somebody else a designer first.`,
  );
}

export function personDisabled(name: string): Problem {
  return disabled(`${name} was removed from the organisation, and can be given no role.`);
}

export const noProduct = () => notFound('There is no such product, or it was deleted.');
export const noPerson = () => notFound('There is no such person.');
export const noMember = () => notFound('This person has no role in the product.');
