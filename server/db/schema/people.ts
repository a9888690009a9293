import { sql } from 'drizzle-orm';
import { boolean, check, pgEnum, pgTable, text, uniqueIndex } from 'drizzle-orm/pg-core';
import { moment, primaryKeyUuid, writtenAt } from './columns';

export const organisationRole = pgEnum('organisation_role', ['administrator', 'member']);

/** People are never deleted, since what they did keeps their name; who is removed stays as a disabled row. */
export const people = pgTable(
  'people',
  {
    id: primaryKeyUuid(),
    name: text().notNull(),
    /** As it was written; two that differ in upper and lower case only are the same. */
    email: text().notNull(),
    passwordHash: text().notNull(),
    organisationRole: organisationRole().notNull().default('member'),
    mayCreateProducts: boolean().notNull().default(false),
    createdAt: writtenAt(),
    lastSeenAt: moment(),
    disabledAt: moment(),
    /** Since then the person appears in no list; a new invitation brings them back. */
    removedAt: moment(),
  },
  ({ email, name, disabledAt, removedAt }) => [
    uniqueIndex('people_email_unique').on(sql`lower(${email})`),
    check('people_name_filled', sql`length(trim(${name})) > 0`),
    check('people_removed_disabled', sql`${removedAt} is null or ${disabledAt} is not null`),
  ],
);
