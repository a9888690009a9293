import { sql } from 'drizzle-orm';
import {
  check,
  integer,
  index,
  pgTable,
  primaryKey,
  text,
  unique,
  uniqueIndex,
  uuid,
} from 'drizzle-orm/pg-core';
import { moment, primaryKeyUuid, writtenAt } from './columns';
import { people } from './people';
import { products } from './products';
import { variantRevisions } from './variant-revisions';

/** A named set of parameters that variants of a product refer to, such as a belt of one supplier. */
export const parts = pgTable(
  'parts',
  {
    id: primaryKeyUuid(),
    productId: uuid()
      .notNull()
      .references(() => products.id),
    name: text().notNull(),
    createdAt: writtenAt(),
    archivedAt: moment(),
  },
  ({ productId, name, archivedAt }) => [
    uniqueIndex('parts_name_unique')
      .on(productId, sql`lower(${name})`)
      .where(sql`${archivedAt} is null`),
    check('parts_name_filled', sql`length(trim(${name})) > 0`),
  ],
);

export const partRevisions = pgTable(
  'part_revisions',
  {
    id: primaryKeyUuid(),
    partId: uuid()
      .notNull()
      .references(() => parts.id),
    number: integer().notNull(),
    /** Canonical text of the parameters with nominals and bands. */
    parameters: text().notNull(),
    note: text().notNull().default(''),
    authorId: uuid()
      .notNull()
      .references(() => people.id),
    createdAt: writtenAt(),
  },
  ({ partId, number }) => [
    unique('part_revisions_number').on(partId, number),
    check('part_revisions_from_one', sql`${number} >= 1`),
  ],
);

/** Which parts a variant revision carries. */
export const variantRevisionParts = pgTable(
  'variant_revision_parts',
  {
    variantRevisionId: uuid()
      .notNull()
      .references(() => variantRevisions.id, { onDelete: 'cascade' }),
    partRevisionId: uuid()
      .notNull()
      .references(() => partRevisions.id),
  },
  ({ variantRevisionId, partRevisionId }) => [
    primaryKey({ columns: [variantRevisionId, partRevisionId] }),
    index('variant_revision_parts_part').on(partRevisionId),
  ],
);
