import { sql } from 'drizzle-orm';
import { check, integer, pgTable, primaryKey, text, uuid } from 'drizzle-orm/pg-core';
import { writtenAt } from './columns';
import { people } from './people';
import { scenarioRevisions } from './scenario-revisions';
import { scenarios } from './scenarios';

/**
 * What a person is writing, one row a scenario and person. Saved by compare-and-set: an update names the
 * version it began from and raises it, so two tabs of one person cannot overwrite each other unseen.
 */
export const scenarioDrafts = pgTable(
  'scenario_drafts',
  {
    scenarioId: uuid()
      .notNull()
      .references(() => scenarios.id, { onDelete: 'cascade' }),
    personId: uuid()
      .notNull()
      .references(() => people.id, { onDelete: 'cascade' }),
    /** The revision it began from; null where the scenario has none yet. */
    baseRevisionId: uuid().references(() => scenarioRevisions.id),
    version: integer().notNull().default(1),
    content: text().notNull(),
    savedAt: writtenAt(),
  },
  ({ scenarioId, personId, version }) => [
    primaryKey({ columns: [scenarioId, personId] }),
    check('scenario_drafts_version', sql`${version} >= 1`),
  ],
);
