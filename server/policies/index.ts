export {
  everybody,
  inOrganisation,
  inProduct,
  PRODUCT_OBJECTS,
  signedIn,
  type AccessRule,
  type ProductObject,
} from './access-rule';
export { mayInOrganisation, ORGANISATION_ACTIONS, type OrganisationAction } from './organisation-policy';
export { decideInProduct, PRODUCT_ACTIONS, type ProductAction, type ProductDecision } from './product-policy';
export { mayDecideReview, type ReviewedWork } from './review-policy';
export {
  ORGANISATION_ROLES,
  PRODUCT_ROLES,
  type Actor,
  type OrganisationRole,
  type ProductRole,
} from './roles';
