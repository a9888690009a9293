import * as z from '../zod';
import { idSchema, instantSchema, noteSchema, productRoleSchema, titleSchema } from './identity';
import { runSummarySchema } from './runs';

/** One numbered, immutable revision of a scenario. `study` is the composed study in canonical form. */
export const scenarioRevisionSchema = z.object({
  number: z.int(),
  variantRevision: z.int(),
  study: z.unknown(),
  studyHash: z.string(),
  note: z.string(),
  author: z.string(),
  at: instantSchema,
  run: runSummarySchema.nullable(),
});
export type ScenarioRevision = z.infer<typeof scenarioRevisionSchema>;

/** A revision as the list of them shows it; each with its study would be a megabyte a line. */
export const listedRevisionSchema = scenarioRevisionSchema.omit({ study: true });
export type ListedRevision = z.infer<typeof listedRevisionSchema>;

/** A person's unsaved work on a scenario; `version` rises with every save of the draft. */
export const scenarioDraftSchema = z.object({
  baseRevision: z.int(),
  version: z.int(),
  study: z.unknown(),
  at: instantSchema,
});
export type ScenarioDraft = z.infer<typeof scenarioDraftSchema>;

export const scenarioSchema = z.object({
  id: idSchema,
  variantId: idSchema,
  productId: idSchema,
  name: z.string(),
  productName: z.string(),
  variantName: z.string(),
  role: productRoleSchema.nullable(),
  head: scenarioRevisionSchema,
  draft: scenarioDraftSchema.nullable(),
});
export type Scenario = z.infer<typeof scenarioSchema>;

export const newScenarioSchema = z.object({ name: titleSchema, study: z.unknown() });
export type NewScenario = z.infer<typeof newScenarioSchema>;

/** Revisions are numbered from 1, versions of drafts rise from wherever they begin; 0 stands for none. */
const countedSchema = z
  .int()
  .min(0)
  .max(2 ** 31 - 1);

/** Saves a revision on top of `baseRevision`; answered by 409 with the newer one where that is not the head. */
export const saveScenarioSchema = z.object({
  baseRevision: countedSchema,
  study: z.unknown(),
  note: noteSchema,
});
export type SaveScenario = z.infer<typeof saveScenarioSchema>;

/** Saves the draft on top of `version` (0: none yet); answered by 409 with the newer one. */
export const saveDraftSchema = z.object({
  baseRevision: countedSchema,
  version: countedSchema,
  study: z.unknown(),
});
export type SaveDraft = z.infer<typeof saveDraftSchema>;
