import { sql } from 'drizzle-orm';
import { check, index, integer, jsonb, pgEnum, pgTable, real, text, uuid } from 'drizzle-orm/pg-core';
import type { RunFigures } from '../../../shared/contracts/api';
import { moment, primaryKeyUuid, writtenAt } from './columns';
import { people } from './people';
import { scenarioRevisions } from './scenario-revisions';

export const runState = pgEnum('run_state', ['queued', 'running', 'done', 'failed', 'cancelled']);

/** One computation of a saved revision. What is done is never changed again. */
export const runs = pgTable(
  'runs',
  {
    id: primaryKeyUuid(),
    scenarioRevisionId: uuid()
      .notNull()
      .references(() => scenarioRevisions.id),
    state: runState().notNull().default('queued'),
    engineVersion: text().notNull(),
    studyHash: text().notNull(),
    answerHash: text().notNull(),
    requestedBy: uuid()
      .notNull()
      .references(() => people.id),
    queuedAt: writtenAt(),
    startedAt: moment(),
    finishedAt: moment(),
    /** Set when somebody asks to cancel; the worker looks. */
    cancelRequestedAt: moment(),
    /** How often a worker has begun it: more than once where a server died in between. */
    attempts: integer().notNull().default(0),
    /** Share of the work that is done, 0 to 1. */
    progress: real().notNull().default(0),
    /** The result file's text, without the map. */
    result: text(),
    /** What lists show of the result, so that they need not read it. */
    figures: jsonb().$type<RunFigures>(),
    error: text(),
  },
  ({ scenarioRevisionId, state, answerHash, requestedBy, finishedAt, progress, result, error }) => [
    index('runs_scenario_revision').on(scenarioRevisionId),
    index('runs_answer').on(answerHash),
    index('runs_requested_by').on(requestedBy),
    index('runs_open')
      .on(state)
      .where(sql`${state} in ('queued', 'running')`),
    check('runs_result_when_done', sql`(${state} = 'done') = (${result} is not null)`),
    check('runs_error_when_failed', sql`(${state} = 'failed') = (${error} is not null)`),
    check(
      'runs_finished_when_over',
      sql`(${state} in ('done', 'failed', 'cancelled')) = (${finishedAt} is not null)`,
    ),
    check('runs_progress_share', sql`${progress} between 0 and 1`),
  ],
);
