export { archiveVariants, lockProduct, lockVariants } from './variants.repository';
export { variantRoutes } from './variants.routes';
export { createVariant, FIRST_SCENARIO, type VariantDependencies } from './variants.usecases';
