export { computeRunJob } from './compute-run';
export { previewRoutes } from './previews.routes';
export { forgetPreviewsJob } from './previews.usecases';
export { runsRoutes, type RunsDependencies } from './runs.routes';
export { requestRun, type RunRequest } from './runs.usecases';
export { summariesOf } from './summaries';
