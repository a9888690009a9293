import * as z from '../zod';
import { mapAnswerSchema, resultSchema } from '../result';
import { idSchema, instantSchema } from './identity';

export const RUN_STATES = ['queued', 'running', 'done', 'failed', 'cancelled'] as const;
export const runStateSchema = z.enum(RUN_STATES);
export type RunState = z.infer<typeof runStateSchema>;

/** What lists and ladders show of a run's result, in the payload's unit; null where there is no such figure. */
export const runFiguresSchema = z.object({
  unit: z.string().nullable(),
  verdict: z.enum(['holds', 'fails', 'undecided']).nullable(),
  proof: z.enum(['proved', 'sampled']).nullable(),
  approximated: z.boolean(),
  ratedLow: z.number().nullable(),
  ratedHigh: z.number().nullable(),
  provedLow: z.number().nullable(),
  provedHigh: z.number().nullable(),
  /** Payload of the failing point beyond the heavy end. */
  failsAt: z.number().nullable(),
  /** The same beyond the light end. */
  failsBelow: z.number().nullable(),
  plate: z.number().nullable(),
  limiting: z.string().nullable(),
});
export type RunFigures = z.infer<typeof runFiguresSchema>;

/** A run as lists and ladders show it; without figures (all null) until it is done. */
export const runSummarySchema = z.object({
  id: idSchema,
  state: runStateSchema,
  at: instantSchema,
  ...runFiguresSchema.shape,
});
export type RunSummary = z.infer<typeof runSummarySchema>;

export const runSchema = z.object({
  id: idSchema,
  scenarioId: idSchema,
  revision: z.int(),
  state: runStateSchema,
  progress: z.number(),
  engine: z.string(),
  studyHash: z.string(),
  requestedBy: z.string(),
  requestedAt: instantSchema,
  finishedAt: instantSchema.nullable(),
  milliseconds: z.number().nullable(),
  error: z.string().nullable(),
  result: resultSchema.nullable(),
});
export type Run = z.infer<typeof runSchema>;

/** A run as the list of a scenario's runs shows it, newest first. */
export const listedRunSchema = runSchema
  .omit({ result: true })
  .extend({ figures: runFiguresSchema.nullable() });
export type ListedRun = z.infer<typeof listedRunSchema>;
export const runListSchema = z.object({ items: z.array(listedRunSchema) });
export const runMapSchema = mapAnswerSchema;

/** A draft computed and not kept. `supersedes` names the stream of previews: a newer one cancels an older one. */
export const previewSchema = z.object({ study: z.unknown(), supersedes: z.string().max(80).optional() });
export type Preview = z.infer<typeof previewSchema>;
export const previewMapSchema = previewSchema.extend({
  columns: z.int().min(2).max(201),
  rows: z.int().min(2).max(201),
  /** Milliseconds: the finest grid up to the stated one that is done by then. Left out: the stated one. */
  within: z.int().min(1).max(10_000).optional(),
});
export type PreviewMap = z.infer<typeof previewMapSchema>;
export const previewAnswerSchema = resultSchema;
export const previewMapAnswerSchema = mapAnswerSchema;

/** An entry of the event stream; `id` rises, so that a reader can go on where it stopped. */
export const runEventSchema = z.object({
  id: z.string(),
  runId: idSchema,
  scenarioId: idSchema,
  kind: z.enum(['queued', 'started', 'progress', 'done', 'failed', 'cancelled']),
  progress: z.number(),
});
export type RunEvent = z.infer<typeof runEventSchema>;
