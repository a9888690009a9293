import * as z from './zod';
import { needs, oneOf } from './message';
import { matrixSchema, referenceSchema, scalarSchema, scalarWith, vectorSchema } from './scalar';

export const LAW_NAMES = ['pid', 'state-feedback', 'transfer-function', 'state-space'] as const;
export type LawName = (typeof LAW_NAMES)[number];

const gain = scalarWith('(0 for none)');

/** u = kp e + ki ∫e dt + kd de/dt, e = r − y; the derivative filtered with `derivativeTime`, 0 or left out = ideal. */
export const pidLawSchema = z.object({
  law: z.literal('pid'),
  input: referenceSchema,
  output: referenceSchema,
  kp: gain,
  ki: gain,
  kd: gain,
  derivativeTime: scalarSchema.optional(),
});
export type PidLaw = z.infer<typeof pidLawSchema>;

/** u = −Σ gain · state − gain_I ∫(y − r) dt; states that are not listed have gain 0. */
export const stateFeedbackLawSchema = z.object({
  law: z.literal('state-feedback'),
  input: referenceSchema,
  gains: z.record(z.string(), scalarSchema, {
    error: needs('an object of state names, each with a number or an expression'),
  }),
  integral: z
    .object(
      { output: referenceSchema, gain: scalarSchema },
      { error: needs('an object with output and gain') },
    )
    .optional(),
});
export type StateFeedbackLaw = z.infer<typeof stateFeedbackLawSchema>;

const coefficients = vectorSchema.min(1, { error: 'must list at least one coefficient' });

/** u = numerator(s) / denominator(s) · e, coefficients in descending powers of s; proper. */
export const transferFunctionLawSchema = z.object({
  law: z.literal('transfer-function'),
  input: referenceSchema,
  output: referenceSchema,
  numerator: coefficients,
  denominator: coefficients,
});
export type TransferFunctionLaw = z.infer<typeof transferFunctionLawSchema>;

/** x′ = A x + B e, u = C x + D e. */
export const stateSpaceLawSchema = z.object({
  law: z.literal('state-space'),
  input: referenceSchema,
  output: referenceSchema,
  A: matrixSchema,
  B: vectorSchema,
  C: vectorSchema,
  D: scalarWith('(0 for none)'),
});
export type StateSpaceLaw = z.infer<typeof stateSpaceLawSchema>;

const lawWord = oneOf(LAW_NAMES);

export const lawSchema = z.discriminatedUnion(
  'law',
  [pidLawSchema, stateFeedbackLawSchema, transferFunctionLawSchema, stateSpaceLawSchema],
  {
    error: (issue) =>
      typeof issue.input === 'object' && issue.input !== null && !Array.isArray(issue.input)
        ? lawWord({ input: 'law' in issue.input ? issue.input.law : undefined })
        : needs('a law such as { "law": "pid", … }')(issue),
  },
);
export type Law = z.infer<typeof lawSchema>;

export const controlSchema = z.union(
  [lawSchema, z.array(lawSchema).min(1, { error: 'must list at least one law' })],
  { error: needs('a law or a list of laws') },
);
export type Control = z.infer<typeof controlSchema>;

/** The laws of a study as a list, however it writes them. */
export function lawsOf(control: Control | undefined): readonly Law[] {
  if (control === undefined) return [];
  return Array.isArray(control) ? control : [control];
}
