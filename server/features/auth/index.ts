export { createIdentify, type IdentifyDependencies } from './identify';
