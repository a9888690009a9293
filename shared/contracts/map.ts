import * as z from './zod';
import { needs, oneOf } from './message';
import { referenceSchema, scalarSchema } from './scalar';

export const MAP_MEASURES = [
  'decayRate',
  'dampingRatio',
  'gainMargin',
  'phaseMargin',
  'modulusMargin',
  'delayMargin',
  'closest',
] as const;
export type MapMeasure = (typeof MAP_MEASURES)[number];

export const MAP_OTHERS = ['nominal', 'anywhere'] as const;
export type MapOthers = (typeof MAP_OTHERS)[number];

/** What a map uses where the study leaves it out. */
export const MAP_DEFAULTS = { columns: 41, rows: 31, measure: 'closest', others: 'nominal' } as const;

const NODES_MESSAGE = needs('an integer from 2 to 501');
const nodes = z
  .int({ error: NODES_MESSAGE })
  .min(2, { error: NODES_MESSAGE })
  .max(501, { error: NODES_MESSAGE });

/** Two parameters spanning a map, its range and its measure. A range left out follows from the parameter's band. */
export const mapSchema = z.object(
  {
    x: referenceSchema,
    xFrom: scalarSchema.optional(),
    xTo: scalarSchema.optional(),
    y: referenceSchema,
    yFrom: scalarSchema.optional(),
    yTo: scalarSchema.optional(),
    columns: nodes.optional(),
    rows: nodes.optional(),
    measure: z.enum(MAP_MEASURES, { error: oneOf(MAP_MEASURES) }).optional(),
    others: z.enum(MAP_OTHERS, { error: oneOf(MAP_OTHERS) }).optional(),
  },
  { error: needs('a map with x and y') },
);
export type MapRequest = z.infer<typeof mapSchema>;
