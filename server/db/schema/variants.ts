import { sql } from 'drizzle-orm';
import { check, index, integer, pgTable, text, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import { moment, primaryKeyUuid, writtenAt } from './columns';
import { products } from './products';

export const variants = pgTable(
  'variants',
  {
    id: primaryKeyUuid(),
    productId: uuid()
      .notNull()
      .references(() => products.id),
    name: text().notNull(),
    /** Order on the variant ladder; where two are equal, the older comes first. */
    position: integer().notNull(),
    createdAt: writtenAt(),
    archivedAt: moment(),
  },
  ({ productId, name, position, archivedAt }) => [
    uniqueIndex('variants_name_unique')
      .on(productId, sql`lower(${name})`)
      .where(sql`${archivedAt} is null`),
    index('variants_product').on(productId, position),
    check('variants_name_filled', sql`length(trim(${name})) > 0`),
  ],
);
