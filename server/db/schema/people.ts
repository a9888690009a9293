import { sql } from 'drizzle-orm';
import { boolean, check, pgEnum, pgTable, text, uniqueIndex } from 'drizzle-orm/pg-core';
import { moment, primaryKeyUuid, writtenAt } from './columns';

export const organisationRole = pgEnum('organisation_role', ['administrator', 'member']);

/** People are never deleted, since what they did keeps their name; who is removed is disabled. */
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
    disabledAt: moment(),
  },
  ({ email, name }) => [
    uniqueIndex('people_email_unique').on(sql`lower(${email})`),
    check('people_name_filled', sql`length(trim(${name})) > 0`),
  ],
);
