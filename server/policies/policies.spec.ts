import { describe, expect, it } from 'vitest';
import {
  type Actor,
  decideInProduct,
  mayDecideReview,
  mayInOrganisation,
  ORGANISATION_ACTIONS,
  type OrganisationAction,
  PRODUCT_ACTIONS,
  type ProductAction,
} from '.';

const member: Actor = { organisationRole: 'member', mayCreateProducts: false };
const creator: Actor = { organisationRole: 'member', mayCreateProducts: true };
const administrator: Actor = { organisationRole: 'administrator', mayCreateProducts: false };

/** An action that no table knows, as a caller without types could name it. */
const unknown = (action: string) => action as OrganisationAction & ProductAction;

describe('in the organisation', () => {
  const allowedTo = (actor: Actor) =>
    ORGANISATION_ACTIONS.filter((action) => mayInOrganisation(actor, action));

  it('members look at what is theirs', () => {
    expect(allowedTo(member)).toEqual(['organisation.view', 'product.list']);
  });

  it('only those with the flag create products, administrators not by their role', () => {
    expect(allowedTo(creator)).toEqual(['organisation.view', 'product.list', 'product.create']);
    expect(mayInOrganisation(administrator, 'product.create')).toBe(false);
  });

  it('administrators do all the rest', () => {
    const rest = ORGANISATION_ACTIONS.filter((action) => action !== 'product.create');
    expect(allowedTo(administrator)).toEqual(rest);
  });

  it.each(['people.promote', 'toString', '__proto__', ''])('nobody may do "%s"', (action) => {
    expect(mayInOrganisation(administrator, unknown(action))).toBe(false);
  });
});

describe('in a product', () => {
  const allowedTo = (actor: Actor, role: Parameters<typeof decideInProduct>[1]) =>
    PRODUCT_ACTIONS.filter((action) => decideInProduct(actor, role, action) === 'allowed');
  const reading = PRODUCT_ACTIONS.filter((action) => /\.(view|read|compute)$/.test(action));

  it('those without a role do not learn of it, whatever they may create', () => {
    for (const action of PRODUCT_ACTIONS) {
      expect(decideInProduct(member, undefined, action)).toBe('hidden');
      expect(decideInProduct(creator, undefined, action)).toBe('hidden');
    }
  });

  it('viewers read and comment', () => {
    expect(allowedTo(member, 'viewer')).toEqual([...reading, 'comment.write']);
  });

  it('reviewers do what viewers do, and decide reviews', () => {
    expect(allowedTo(member, 'reviewer')).toEqual([...reading, 'review.decide', 'comment.write']);
  });

  it('designers do everything but set roles and decide reviews', () => {
    const rest = PRODUCT_ACTIONS.filter((action) => action !== 'members.set' && action !== 'review.decide');
    expect(allowedTo(member, 'designer')).toEqual(rest);
  });

  it('administrators without a role read and set roles, and write nothing', () => {
    expect([...allowedTo(administrator, undefined)].sort()).toEqual([...reading, 'members.set'].sort());
  });

  it('administrators with a role have both', () => {
    expect(decideInProduct(administrator, 'designer', 'scenario.edit')).toBe('allowed');
    expect(decideInProduct(administrator, 'designer', 'members.set')).toBe('allowed');
    expect(decideInProduct(administrator, 'viewer', 'scenario.edit')).toBe('forbidden');
  });

  it.each(['run.delete', 'constructor', ''])('nobody may do "%s"', (action) => {
    expect(decideInProduct(administrator, 'designer', unknown(action))).toBe('forbidden');
  });
});

describe('a review', () => {
  const work = { askedBy: 'ada', editedBy: ['ben', 'cleo'] };

  it('is decided by somebody else than those who asked or edited', () => {
    expect(mayDecideReview('dora', work)).toBe(true);
    expect(['ada', 'ben', 'cleo'].map((person) => mayDecideReview(person, work))).toEqual([
      false,
      false,
      false,
    ]);
  });
});
