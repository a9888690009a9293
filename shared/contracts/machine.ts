import * as z from './zod';
import { needs, oneOf } from './message';
import { matrixSchema, referenceSchema, vectorSchema } from './scalar';

/** The templates of `shared/machines`; the names are part of the study format. */
export const TEMPLATE_IDS = [
  'mass-spring-damper',
  'two-mass-drive',
  'balancing-carrier',
  'suspended-cabin',
  'single-track',
] as const;
export type TemplateId = (typeof TEMPLATE_IDS)[number];

const nameListOf = (what: string) =>
  z
    .array(referenceSchema, { error: needs(`a list of ${what} names`) })
    .min(1, { error: `must name at least one ${what}` });

const vectorsByName = z.record(z.string(), vectorSchema, {
  error: needs('an object of names, each with a list of numbers or expressions'),
});

/** A machine from a template; its parameters carry the template's ids. */
export const templateMachineSchema = z.object({
  template: z.enum(TEMPLATE_IDS, { error: oneOf(TEMPLATE_IDS) }),
});
export type TemplateMachine = z.infer<typeof templateMachineSchema>;

/** y = position · q + velocity · q'; either part may be left out. */
export const secondOrderOutputSchema = z
  .object(
    { position: vectorSchema.optional(), velocity: vectorSchema.optional() },
    { error: needs('an output with "position" or "velocity", each a list of numbers or expressions') },
  )
  .refine(({ position, velocity }) => position !== undefined || velocity !== undefined, {
    error: 'must have "position" or "velocity"',
  });
export type SecondOrderOutput = z.infer<typeof secondOrderOutputSchema>;

/** M q″ + D q′ + K q = F u + G w, each input and disturbance a column of F or G. */
export const secondOrderMachineSchema = z.object({
  coordinates: nameListOf('coordinate'),
  mass: matrixSchema,
  damping: matrixSchema,
  stiffness: matrixSchema,
  inputs: vectorsByName.optional(),
  disturbances: vectorsByName.optional(),
  outputs: z
    .record(z.string(), secondOrderOutputSchema, { error: needs('an object of names, each with an output') })
    .optional(),
});
export type SecondOrderMachine = z.infer<typeof secondOrderMachineSchema>;

/** E x′ = A x + B u + G w, y = C x; E is the identity where `descriptor` is left out. */
export const firstOrderMachineSchema = z.object({
  states: nameListOf('state'),
  descriptor: matrixSchema.optional(),
  dynamics: matrixSchema,
  inputs: vectorsByName.optional(),
  disturbances: vectorsByName.optional(),
  outputs: vectorsByName.optional(),
});
export type FirstOrderMachine = z.infer<typeof firstOrderMachineSchema>;

export type CustomMachine = SecondOrderMachine | FirstOrderMachine;

export const machineSchema = z.union([
  templateMachineSchema,
  secondOrderMachineSchema,
  firstOrderMachineSchema,
]);
export type Machine = z.infer<typeof machineSchema>;

export function isTemplateMachine(machine: Machine): machine is TemplateMachine {
  return 'template' in machine;
}

export function isSecondOrder(machine: CustomMachine): machine is SecondOrderMachine {
  return 'coordinates' in machine;
}

/**
 * The names that a state feedback may use: coordinates and, with an apostrophe, their velocities (second order), or the
 * states (first order); in the order of the state vector (q, q′).
 */
export function stateNames(machine: CustomMachine): string[] {
  if (!isSecondOrder(machine)) return [...machine.states];
  return [...machine.coordinates, ...machine.coordinates.map((name) => `${name}'`)];
}
