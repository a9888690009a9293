export { Empty } from './empty';
export { Failed } from './failed';
export type { Failure, Loaded, LoadState } from './load-state';
export { Waiting } from './waiting';
export { WhenLoaded } from './when-loaded';
