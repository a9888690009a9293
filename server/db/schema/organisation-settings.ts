import { sql } from 'drizzle-orm';
import { boolean, check, pgTable, text, uuid } from 'drizzle-orm/pg-core';
import { writtenAt } from './columns';
import { people } from './people';

/** The one row of what holds for the whole organisation. */
export const organisationSettings = pgTable(
  'organisation_settings',
  {
    /** Always true: the key that allows no second row. */
    only: boolean().primaryKey().default(true),
    name: text().notNull(),
    changedAt: writtenAt(),
    changedBy: uuid().references(() => people.id),
  },
  ({ only }) => [check('organisation_settings_one_row', sql`${only}`)],
);
