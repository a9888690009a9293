import { sql } from 'drizzle-orm';
import { check, integer, pgTable, uuid } from 'drizzle-orm/pg-core';
import { float64Array } from './columns';
import { runs } from './runs';

/** The cells of a run's map, row by row; NaN where a cell is unknown. */
export const mapValues = pgTable(
  'map_values',
  {
    runId: uuid()
      .primaryKey()
      .references(() => runs.id, { onDelete: 'cascade' }),
    columns: integer().notNull(),
    rows: integer().notNull(),
    values: float64Array().notNull(),
  },
  ({ columns, rows, values }) => [
    check('map_values_complete', sql`octet_length(${values}) = 8 * ${columns} * ${rows}`),
  ],
);
