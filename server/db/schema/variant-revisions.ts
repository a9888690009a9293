import { sql } from 'drizzle-orm';
import { check, integer, pgTable, text, unique, uuid } from 'drizzle-orm/pg-core';
import { primaryKeyUuid, writtenAt } from './columns';
import { people } from './people';
import { variants } from './variants';

/**
 * Numbered from 1 without gaps. Whoever saves inserts the number after the one they began from: where two do,
 * the constraint `variant_revisions_number` refuses the later.
 */
export const variantRevisions = pgTable(
  'variant_revisions',
  {
    id: primaryKeyUuid(),
    variantId: uuid()
      .notNull()
      .references(() => variants.id),
    number: integer().notNull(),
    /** Canonical text of machine, control, hardware and parameters with their nominals. */
    description: text().notNull(),
    note: text().notNull().default(''),
    authorId: uuid()
      .notNull()
      .references(() => people.id),
    createdAt: writtenAt(),
  },
  ({ variantId, number }) => [
    unique('variant_revisions_number').on(variantId, number),
    check('variant_revisions_from_one', sql`${number} >= 1`),
  ],
);
