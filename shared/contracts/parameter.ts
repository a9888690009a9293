import * as z from './zod';
import { needs, oneOf } from './message';
import { scalarSchema, scalarWith, textSchema } from './scalar';

/** Where a spread comes from: manufacture, the operator's choice (height, speed, rope, payload), or wear. */
export const PARAMETER_KINDS = ['tolerance', 'use', 'wear'] as const;

export const parameterKindSchema = z.enum(PARAMETER_KINDS, { error: oneOf(PARAMETER_KINDS) });
export type ParameterKind = z.infer<typeof parameterKindSchema>;

/**
 * A named quantity. Without `low` and `high` it is exact. `minimum` and `maximum` are physical ends that no stretch or
 * search goes beyond. Values are in `unit` where `shared/units` knows it, else in SI.
 */
export const parameterSchema = z.object(
  {
    id: z.string({ error: needs('a name', 'such as "m"') }),
    label: textSchema.optional(),
    unit: textSchema.optional(),
    nominal: scalarWith(),
    low: scalarSchema.optional(),
    high: scalarSchema.optional(),
    minimum: scalarSchema.optional(),
    maximum: scalarSchema.optional(),
    kind: parameterKindSchema.optional(),
  },
  { error: needs('a parameter with id and nominal') },
);
export type Parameter = z.infer<typeof parameterSchema>;
