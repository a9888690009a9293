import * as z from '../zod';

/** An error of the API: problem details of RFC 9457 with a stable `code`. */
export const problemSchema = z.object({
  type: z.string(),
  title: z.string(),
  status: z.int(),
  detail: z.string(),
  code: z.string(),
  requestId: z.string().optional(),
  /** Faults of fields or of a study, each with its path. */
  faults: z.array(z.object({ path: z.string(), message: z.string() })).optional(),
  /** With a conflict: what is kept on the server now, and what was sent. */
  current: z.unknown().optional(),
  sent: z.unknown().optional(),
});
export type Problem = z.infer<typeof problemSchema>;
