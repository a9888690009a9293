import { sql } from 'drizzle-orm';
import { check, integer, pgTable, text, uuid } from 'drizzle-orm/pg-core';
import type { MapMeasure, MapOthers } from '../../../shared/contracts';
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
    /** Nodes of both axes, each in its parameter's unit. */
    x: float64Array().notNull(),
    y: float64Array().notNull(),
    measure: text().$type<MapMeasure>().notNull(),
    others: text().$type<MapOthers>().notNull(),
    values: float64Array().notNull(),
  },
  ({ columns, rows, x, y, values }) => [
    check('map_values_complete', sql`octet_length(${values}) = 8 * ${columns} * ${rows}`),
    check('map_values_axes', sql`octet_length(${x}) = 8 * ${columns} and octet_length(${y}) = 8 * ${rows}`),
  ],
);
