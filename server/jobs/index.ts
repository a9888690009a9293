export { createEngine, type Engine, type EngineCall, type EngineOptions } from './engine';
export type { AnalysisAnswer, MapGrid } from './engine-task';
export { enqueueJob, type JobOrder } from './enqueue';
export { mapRow, type FlatMap } from './flat-map';
export { defineJob, defineRoutine, type JobContext, type JobHandler } from './job';
export { createThrottle } from './throttle';
export { startWorking, type Work, type WorkOptions } from './work';
