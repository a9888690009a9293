import { sql } from 'drizzle-orm';
import { check, pgTable, text, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import { moment, primaryKeyUuid, writtenAt } from './columns';
import { variants } from './variants';

export const scenarios = pgTable(
  'scenarios',
  {
    id: primaryKeyUuid(),
    variantId: uuid()
      .notNull()
      .references(() => variants.id),
    name: text().notNull(),
    createdAt: writtenAt(),
    archivedAt: moment(),
  },
  ({ variantId, name, archivedAt }) => [
    uniqueIndex('scenarios_name_unique')
      .on(variantId, sql`lower(${name})`)
      .where(sql`${archivedAt} is null`),
    check('scenarios_name_filled', sql`length(trim(${name})) > 0`),
  ],
);
