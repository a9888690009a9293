import { sql } from 'drizzle-orm';
import { check, pgTable, text, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import { moment, primaryKeyUuid, writtenAt } from './columns';
import { people } from './people';

/** Archived, never deleted: an old record must reopen. */
export const products = pgTable(
  'products',
  {
    id: primaryKeyUuid(),
    name: text().notNull(),
    description: text().notNull().default(''),
    createdBy: uuid()
      .notNull()
      .references(() => people.id),
    createdAt: writtenAt(),
    archivedAt: moment(),
  },
  ({ name, archivedAt }) => [
    uniqueIndex('products_name_unique')
      .on(sql`lower(${name})`)
      .where(sql`${archivedAt} is null`),
    check('products_name_filled', sql`length(trim(${name})) > 0`),
  ],
);
