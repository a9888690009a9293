import { bigint, index, jsonb, pgTable, text, uuid } from 'drizzle-orm/pg-core';
import { writtenAt } from './columns';
import { runs } from './runs';

/**
 * What happened to runs, in order: triggers make ids visible in rising order only, and wake whoever listens on
 * the channel `run_events`. The id is the event's id on the stream.
 */
export const runEvents = pgTable(
  'run_events',
  {
    id: bigint({ mode: 'number' }).primaryKey().generatedAlwaysAsIdentity(),
    runId: uuid()
      .notNull()
      .references(() => runs.id, { onDelete: 'cascade' }),
    kind: text().notNull(),
    data: jsonb().$type<Record<string, unknown>>().notNull().default({}),
    createdAt: writtenAt(),
  },
  ({ runId, id }) => [index('run_events_run').on(runId, id)],
);
