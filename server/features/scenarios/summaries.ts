import type { RunSummary } from '../../../shared/contracts/api';

/** The run that stands for each scenario revision, by the revision's key; nothing for one that was never run. */
export type SummariesOf = (revisionIds: readonly string[]) => Promise<ReadonlyMap<string, RunSummary>>;
