export { Api } from './api';
export { failureOf } from './failure';
export { loaded } from './loaded';
export { Refusal, refusalText } from './refusal';
export { listOf, type Schema } from './schema';
