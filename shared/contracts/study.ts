import * as z from './zod';
import { controlSchema } from './control';
import { actuatorsSchema, samplingSchema, sensorSchema } from './hardware';
import { machineSchema } from './machine';
import { mapSchema } from './map';
import { needs } from './message';
import { parameterSchema } from './parameter';
import { ratingSchema } from './rating';
import { requirementsSchema } from './requirement';
import { referenceSchema, scalarSchema, textSchema } from './scalar';

export const STUDY_FORMAT = 'tareline-study';
export const STUDY_VERSION = 1;

/** Everything that one analysis needs. */
export const studySchema = z.object({
  format: z.literal(STUDY_FORMAT, { error: `must be "${STUDY_FORMAT}"` }),
  version: z.literal(STUDY_VERSION, { error: `must be ${STUDY_VERSION}` }),
  name: textSchema.optional(),
  machine: machineSchema,
  definitions: z
    .record(z.string(), scalarSchema, {
      error: needs('an object of names, each with a number or an expression'),
    })
    .optional(),
  parameters: z.array(parameterSchema, { error: needs('a list of parameters', '(it may be empty)') }),
  payload: referenceSchema.optional(),
  searchUpTo: scalarSchema.optional(),
  searchDownTo: scalarSchema.optional(),
  rating: ratingSchema.optional(),
  /** Left out: the machine runs without a loop, and no margin can be required. */
  control: controlSchema.optional(),
  actuator: actuatorsSchema.optional(),
  sensor: sensorSchema.optional(),
  sampling: samplingSchema.optional(),
  requirements: requirementsSchema,
  map: mapSchema.optional(),
});
export type Study = z.infer<typeof studySchema>;
