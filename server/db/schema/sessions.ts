import { index, pgTable, text, uuid } from 'drizzle-orm/pg-core';
import { moment, primaryKeyUuid, writtenAt } from './columns';
import { people } from './people';

export const sessions = pgTable(
  'sessions',
  {
    id: primaryKeyUuid(),
    /** SHA-256 of the cookie's token, in hexadecimal; the token itself is nowhere stored. */
    tokenHash: text().notNull().unique('sessions_token_hash'),
    personId: uuid()
      .notNull()
      .references(() => people.id, { onDelete: 'cascade' }),
    createdAt: writtenAt(),
    lastSeenAt: writtenAt(),
    expiresAt: moment().notNull(),
    userAgent: text().notNull().default(''),
    address: text().notNull().default(''),
  },
  ({ personId, expiresAt }) => [
    index('sessions_person').on(personId),
    index('sessions_expiry').on(expiresAt),
  ],
);
