import { index, pgTable, primaryKey, text } from 'drizzle-orm/pg-core';
import { writtenAt } from './columns';

/** Answers of drafts, kept to be given again; any row may go at any time. */
export const previewCache = pgTable(
  'preview_cache',
  {
    answerHash: text().notNull(),
    engineVersion: text().notNull(),
    /** Hash of the map that was asked for, which is no part of the answer hash; empty for answers without one. */
    mapHash: text().notNull().default(''),
    result: text().notNull(),
    lastUsedAt: writtenAt(),
  },
  ({ answerHash, engineVersion, mapHash, lastUsedAt }) => [
    primaryKey({ columns: [answerHash, engineVersion, mapHash] }),
    index('preview_cache_last_used').on(lastUsedAt),
  ],
);
