import type { RunSummary } from '../../../shared/contracts/api';

/** The newest run of each scenario revision, by the revision's key; revisions without a run are not in it. */
export type SummariesOf = (revisionIds: readonly string[]) => Promise<ReadonlyMap<string, RunSummary>>;
