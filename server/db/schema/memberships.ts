import { index, pgEnum, pgTable, primaryKey, uuid } from 'drizzle-orm/pg-core';
import { writtenAt } from './columns';
import { people } from './people';
import { products } from './products';

export const productRole = pgEnum('product_role', ['designer', 'reviewer', 'viewer']);

/** One role a person in a product. */
export const memberships = pgTable(
  'memberships',
  {
    productId: uuid()
      .notNull()
      .references(() => products.id, { onDelete: 'cascade' }),
    personId: uuid()
      .notNull()
      .references(() => people.id, { onDelete: 'cascade' }),
    role: productRole().notNull(),
    changedAt: writtenAt(),
  },
  ({ productId, personId }) => [
    primaryKey({ columns: [productId, personId] }),
    index('memberships_person').on(personId),
  ],
);
