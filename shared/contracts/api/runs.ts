import { z } from '../zod';
import { mapAnswerSchema, resultSchema } from '../result';
import { idSchema, instantSchema } from './identity';

export const RUN_STATES = ['queued', 'running', 'done', 'failed', 'cancelled'] as const;
export const runStateSchema = z.enum(RUN_STATES);
export type RunState = z.infer<typeof runStateSchema>;

/** What lists and ladders show of a run. Figures are in the payload's unit. */
export const runSummarySchema = z.object({
  id: idSchema,
  state: runStateSchema,
  at: instantSchema,
  unit: z.string().nullable(),
  verdict: z.enum(['holds', 'fails', 'undecided']).nullable(),
  proof: z.enum(['proved', 'sampled']).nullable(),
  approximated: z.boolean(),
  ratedLow: z.number().nullable(),
  ratedHigh: z.number().nullable(),
  provedLow: z.number().nullable(),
  provedHigh: z.number().nullable(),
  failsAt: z.number().nullable(),
  plate: z.number().nullable(),
  limiting: z.string().nullable(),
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

/** A draft computed and not kept. `supersedes` names the stream of previews: a newer one cancels an older one. */
export const previewSchema = z.object({ study: z.unknown(), supersedes: z.string().max(80).optional() });
export type Preview = z.infer<typeof previewSchema>;
export const previewMapSchema = previewSchema.extend({
  columns: z.int().min(2).max(201),
  rows: z.int().min(2).max(201),
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
