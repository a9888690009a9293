import { sql } from 'drizzle-orm';
import { index, integer, pgTable, text } from 'drizzle-orm/pg-core';
import { moment, primaryKeyUuid, writtenAt } from './columns';

/**
 * Letters, written in the transaction that causes them and sent afterwards. Where no way out is configured they
 * stay here, for administrators to read.
 */
export const mailOutbox = pgTable(
  'mail_outbox',
  {
    id: primaryKeyUuid(),
    recipient: text().notNull(),
    subject: text().notNull(),
    text: text().notNull(),
    createdAt: writtenAt(),
    attempts: integer().notNull().default(0),
    /** No attempt before this moment. */
    dueAt: writtenAt(),
    sentAt: moment(),
    lastError: text(),
  },
  ({ dueAt, sentAt, createdAt }) => [
    index('mail_outbox_due')
      .on(dueAt)
      .where(sql`${sentAt} is null`),
    index('mail_outbox_created').on(createdAt),
  ],
);
