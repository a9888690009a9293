export { composeStudy } from './compose-study';
export type {
  ComposedMap,
  ComposedParameter,
  ComposedRating,
  ComposedRequirement,
  ComposedStudy,
  ComposedTest,
} from './composed-study';
export { MOST_COLUMNS, MOST_STATES } from './loop-size';
export { NominalValues } from '../loop/nominal-values';
export { pointText } from './point-text';
