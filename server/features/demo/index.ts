export { type DemoDependencies, demoSeed, type SignIn } from './demo.usecases';
