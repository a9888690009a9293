export { addScenario, type NewScenario } from './add-scenario';
export { archiveScenariosOf, listUsedScenarios, lockVariant } from './scenarios.repository';
export { scenarioRoutes } from './scenarios.routes';
export type { Actor, ScenarioDependencies } from './scenarios.usecases';
export type { SummariesOf } from './summaries';
