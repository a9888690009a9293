import { sql } from 'drizzle-orm';
import { check, index, integer, pgTable, text, unique, uuid } from 'drizzle-orm/pg-core';
import { primaryKeyUuid, writtenAt } from './columns';
import { people } from './people';
import { scenarios } from './scenarios';
import { variantRevisions } from './variant-revisions';

/**
 * Numbered from 1 without gaps; see variant_revisions for how two that save at once are told apart
 * (`scenario_revisions_number`). The composed study stands here as text, so that an old record reopens whatever
 * became of its variant.
 */
export const scenarioRevisions = pgTable(
  'scenario_revisions',
  {
    id: primaryKeyUuid(),
    scenarioId: uuid()
      .notNull()
      .references(() => scenarios.id),
    number: integer().notNull(),
    variantRevisionId: uuid()
      .notNull()
      .references(() => variantRevisions.id),
    /** Canonical text of bands, rating, requirements and map: what the scenario adds to its variant. */
    toleranceSet: text().notNull(),
    /** Canonical text of the study composed of both. */
    study: text().notNull(),
    studyHash: text().notNull(),
    /** Hash of the study without what no answer depends on: names, labels, map. */
    answerHash: text().notNull(),
    note: text().notNull().default(''),
    authorId: uuid()
      .notNull()
      .references(() => people.id),
    createdAt: writtenAt(),
  },
  ({ scenarioId, number, variantRevisionId, answerHash }) => [
    unique('scenario_revisions_number').on(scenarioId, number),
    index('scenario_revisions_variant_revision').on(variantRevisionId),
    index('scenario_revisions_answer').on(answerHash),
    check('scenario_revisions_from_one', sql`${number} >= 1`),
  ],
);
