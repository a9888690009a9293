import * as z from './zod';
import { needs } from './message';

/** The longest expression that is read, in characters. */
export const LONGEST_EXPRESSION = 2000;

/**
 * A number or an expression in parameter and definition ids. Only length and finiteness are checked here; expressions
 * are parsed where they are composed.
 */
export function scalarWith(remedy = '') {
  const message = needs('a number or an expression', remedy);
  return z.union(
    [
      z.number({ error: message }),
      z
        .string({ error: message })
        .max(LONGEST_EXPRESSION, {
          error: `must be at most ${LONGEST_EXPRESSION} characters long`,
          abort: true,
        })
        .refine((text) => text.trim() !== '', {
          error: 'must be a number or an expression, not an empty text',
        }),
    ],
    { error: message },
  );
}

export const scalarSchema = scalarWith();
export type Scalar = z.infer<typeof scalarSchema>;

export const vectorSchema = z.array(scalarSchema, { error: needs('a list of numbers or expressions') });
export type Vector = z.infer<typeof vectorSchema>;

export const matrixSchema = z.array(
  z.array(scalarSchema, { error: needs('a row: a list of numbers or expressions') }),
  { error: needs('a matrix: a list of rows, each a list of numbers or expressions') },
);
export type Matrix = z.infer<typeof matrixSchema>;

/** Free text that a person reads: names and labels. */
export const textSchema = z.string({ error: needs('a text') });

/** The name of something that the study itself declares. */
export const referenceSchema = z.string({ error: needs('a name') });
