import type {
  ListedRevision,
  RunSummary,
  ScenarioDraft,
  ScenarioRevision,
} from '../../../shared/contracts/api';
import type { DraftRow } from './drafts.repository';
import type { RevisionRow } from './revisions.repository';

type Summaries = ReadonlyMap<string, RunSummary>;

export function listedRevision(row: Omit<RevisionRow, 'study'>, summaries: Summaries): ListedRevision {
  const { id, number, variantRevision, studyHash, note, author, at } = row;
  return {
    ...{ number, variantRevision, studyHash, note, author },
    at: at.toISOString(),
    run: summaries.get(id) ?? null,
  };
}

export function revisionView(row: RevisionRow, summaries: Summaries): ScenarioRevision {
  return { ...listedRevision(row, summaries), study: JSON.parse(row.study) as unknown };
}

export function draftView({ baseRevision, version, content, at }: DraftRow): ScenarioDraft {
  return { baseRevision, version, study: JSON.parse(content) as unknown, at: at.toISOString() };
}
