export { analyse, analyseInSteps, type AnalysisOptions } from './analysis/analyse';
export { ENGINE_VERSION } from './analysis/engine-version';
export { composeStudy, type ComposedStudy } from './study';
