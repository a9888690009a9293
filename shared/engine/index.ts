export { analyse, analyseInSteps, type AnalysisOptions, type AnswersSoFar } from './analysis/analyse';
export { inUnit } from './analysis/in-units';
export { MapCourse } from './analysis/map-course';
export { ENGINE_VERSION } from './analysis/engine-version';
export { composeStudy, type ComposedStudy } from './study';
