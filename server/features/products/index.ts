export { setMember } from './members.usecases';
export { productRoutes } from './products.routes';
export { createProduct, type ProductDependencies } from './products.usecases';
