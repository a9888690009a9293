import * as z from './zod';
import { MAP_MEASURES, MAP_OTHERS } from './map';
import { MEASURES } from './requirement';

export const RESULT_FORMAT = 'tareline-result';
export const RESULT_VERSION = 1;

const quantity = z.number();
const quantityOrNull = z.number().nullable();

/** `sampled` where a parameter enters in a way that only dense sampling answers. */
export const proofSchema = z.enum(['proved', 'sampled']);
export type Proof = z.infer<typeof proofSchema>;

export const verdictSchema = z.enum(['holds', 'fails', 'undecided']);
export type Verdict = z.infer<typeof verdictSchema>;

/** Parameter values, each in its parameter's unit. */
export const witnessSchema = z.record(z.string(), z.number());
export type Witness = z.infer<typeof witnessSchema>;

const measureSchema = z.enum(MEASURES);

/** The closed loop with every parameter at its nominal value. Margins: null where unlimited, all null if unstable. */
export const nominalAnswerSchema = z.object({
  stable: z.boolean(),
  poles: z.array(z.object({ re: quantity, im: quantity })),
  decayRate: quantityOrNull,
  dampingRatio: quantityOrNull,
  gainMargin: z.object({ up: quantityOrNull, down: quantityOrNull }).nullable(),
  phaseMargin: quantityOrNull,
  delayMargin: quantityOrNull,
  modulusMargin: quantityOrNull,
});
export type NominalAnswer = z.infer<typeof nominalAnswerSchema>;

/** What limits an answer and why it stays open, where it does. */
const limitFields = {
  requirement: measureSchema.optional(),
  witness: witnessSchema.optional(),
  /** rad/s; null where the pole leaves through infinity. */
  frequency: quantityOrNull.optional(),
  reason: z.string().optional(),
  undecided: z.literal(true).optional(),
  /** The share of the searched box that is neither proved nor refuted. */
  openShare: quantity.optional(),
};

export const bandsAnswerSchema = z.object({
  verdict: verdictSchema,
  proof: proofSchema,
  ...limitFields,
  /** The measure at the witness. */
  value: quantityOrNull.optional(),
});
export type BandsAnswer = z.infer<typeof bandsAnswerSchema>;

const twoSidedFields = {
  provedTo: quantityOrNull,
  failsAt: quantityOrNull,
  proof: proofSchema,
  ...limitFields,
};

/** Largest payload and band stretch: proved up to one value, failing at another. */
export const upwardAnswerSchema = z.object({ ...twoSidedFields, searchedUpTo: quantity });
export type UpwardAnswer = z.infer<typeof upwardAnswerSchema>;

/** Smallest payload. */
export const downwardAnswerSchema = z.object({ ...twoSidedFields, searchedDownTo: quantity });
export type DownwardAnswer = z.infer<typeof downwardAnswerSchema>;

/** The plate payload that every test allows; `limitedBy` names the test, null where the requirements themselves limit. */
export const ratingAnswerSchema = z.object({
  allowed: quantityOrNull,
  plate: quantityOrNull,
  limitedBy: z.string().nullable(),
  proof: proofSchema.optional(),
  undecided: z.literal(true).optional(),
});
export type RatingAnswer = z.infer<typeof ratingAnswerSchema>;

/** Phase that the Padé form falls short of the true delay at the limiting frequency, rad. */
export const delayAnswerSchema = z.object({ approximated: z.literal(true), phaseShortfall: quantityOrNull });
export type DelayAnswer = z.infer<typeof delayAnswerSchema>;

/** `values[row][column]`, row 0 at yFrom, nodes with both ends. */
export const mapAnswerSchema = z.object({
  x: z.array(quantity),
  y: z.array(quantity),
  measure: z.enum(MAP_MEASURES),
  others: z.enum(MAP_OTHERS).optional(),
  /** `sampled` where a cell is the least over points of the others' bands. */
  proof: proofSchema.optional(),
  values: z.array(z.array(quantityOrNull)),
});
export type MapAnswer = z.infer<typeof mapAnswerSchema>;

export const warningSchema = z.object({ path: z.string(), message: z.string() });

/** The result of a study. Same study, same engine: the same to the last digit, `work` aside. */
export const resultSchema = z.object({
  format: z.literal(RESULT_FORMAT),
  version: z.literal(RESULT_VERSION),
  engine: z.string(),
  studyHash: z.string(),
  nominal: nominalAnswerSchema,
  bands: bandsAnswerSchema,
  largestPayload: upwardAnswerSchema.nullable(),
  smallestPayload: downwardAnswerSchema.nullable(),
  bandStretch: upwardAnswerSchema.nullable(),
  rating: ratingAnswerSchema.optional(),
  delay: delayAnswerSchema.optional(),
  map: mapAnswerSchema.optional(),
  warnings: z.array(warningSchema).optional(),
  work: z.object({ boxes: quantity, milliseconds: quantity }),
});
export type Result = z.infer<typeof resultSchema>;
