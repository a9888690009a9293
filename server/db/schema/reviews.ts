import { sql } from 'drizzle-orm';
import { check, index, pgEnum, pgTable, text, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import { moment, primaryKeyUuid, writtenAt } from './columns';
import { people } from './people';
import { runs } from './runs';
import { scenarioRevisions } from './scenario-revisions';

export const reviewState = pgEnum('review_state', ['asked', 'approved', 'returned', 'withdrawn']);

export const reviews = pgTable(
  'reviews',
  {
    id: primaryKeyUuid(),
    scenarioRevisionId: uuid()
      .notNull()
      .references(() => scenarioRevisions.id),
    runId: uuid()
      .notNull()
      .references(() => runs.id),
    state: reviewState().notNull().default('asked'),
    askedBy: uuid()
      .notNull()
      .references(() => people.id),
    askedAt: writtenAt(),
    decidedBy: uuid().references(() => people.id),
    decidedAt: moment(),
    withdrawnAt: moment(),
    /** Why an approval no longer stands. */
    withdrawnBecause: text(),
  },
  ({ scenarioRevisionId, runId, state, askedBy, decidedBy, decidedAt, withdrawnAt }) => [
    index('reviews_run').on(runId),
    uniqueIndex('reviews_one_open')
      .on(scenarioRevisionId)
      .where(sql`${state} = 'asked'`),
    check('reviews_decided', sql`(${decidedBy} is null) = (${decidedAt} is null)`),
    check(
      'reviews_decision_has_author',
      sql`${state} not in ('approved', 'returned') or ${decidedBy} is not null`,
    ),
    check('reviews_not_by_asker', sql`${decidedBy} <> ${askedBy}`),
    check('reviews_withdrawn', sql`(${state} = 'withdrawn') = (${withdrawnAt} is not null)`),
  ],
);

export const reviewComments = pgTable(
  'review_comments',
  {
    id: primaryKeyUuid(),
    reviewId: uuid()
      .notNull()
      .references(() => reviews.id, { onDelete: 'cascade' }),
    authorId: uuid()
      .notNull()
      .references(() => people.id),
    text: text().notNull(),
    createdAt: writtenAt(),
  },
  ({ reviewId, createdAt }) => [index('review_comments_review').on(reviewId, createdAt)],
);
