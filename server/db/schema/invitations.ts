import { sql } from 'drizzle-orm';
import { boolean, check, pgTable, text, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import { moment, primaryKeyUuid, writtenAt } from './columns';
import { organisationRole, people } from './people';

/** A link by which somebody joins, and chooses a password. */
export const invitations = pgTable(
  'invitations',
  {
    id: primaryKeyUuid(),
    /** SHA-256 of the link's token, in hexadecimal. */
    tokenHash: text().notNull().unique('invitations_token_hash'),
    name: text().notNull(),
    email: text().notNull(),
    organisationRole: organisationRole().notNull().default('member'),
    mayCreateProducts: boolean().notNull().default(false),
    /** Null for the first administrator, whom nobody could invite. */
    invitedBy: uuid().references(() => people.id),
    createdAt: writtenAt(),
    expiresAt: moment().notNull(),
    acceptedAt: moment(),
    acceptedBy: uuid().references(() => people.id),
    revokedAt: moment(),
  },
  ({ email, acceptedAt, acceptedBy, revokedAt }) => [
    uniqueIndex('invitations_one_open')
      .on(sql`lower(${email})`)
      .where(sql`${acceptedAt} is null and ${revokedAt} is null`),
    check('invitations_accepted', sql`(${acceptedAt} is null) = (${acceptedBy} is null)`),
  ],
);
