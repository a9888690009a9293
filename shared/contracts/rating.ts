import * as z from './zod';
import { needs } from './message';
import { requirementsSchema } from './requirement';
import { scalarSchema, textSchema } from './scalar';

/** An over-load test: the plate payload times `factor`, under requirements of its own or the study's. */
export const ratingTestSchema = z.object(
  {
    name: textSchema,
    factor: scalarSchema,
    clause: textSchema.optional(),
    requirements: requirementsSchema.optional(),
  },
  { error: needs('a test with name and factor') },
);
export type RatingTest = z.infer<typeof ratingTestSchema>;

/** What the plate says today, and the steps that plates come in. */
export const ratingSchema = z.object(
  {
    payload: scalarSchema.optional(),
    step: scalarSchema.optional(),
    tests: z.array(ratingTestSchema, { error: needs('a list of tests') }).optional(),
  },
  { error: needs('a rating with payload, step and tests') },
);
export type Rating = z.infer<typeof ratingSchema>;

/** Why a value cannot be a rating's step, factor (both > 0) or payload (≥ 0); undefined if it can. */
export function ratingFault(quantity: 'payload' | 'step' | 'factor', value: number): string | undefined {
  if (!Number.isFinite(value)) return 'must be finite';
  if (quantity === 'payload') return value >= 0 ? undefined : 'must not be negative';
  return value > 0 ? undefined : 'must be above 0';
}
