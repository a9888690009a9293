import type { z } from 'zod';
import {
  firstOrderMachineSchema,
  secondOrderMachineSchema,
  templateMachineSchema,
  type Machine,
} from './machine';

/** The key whose presence says which form a machine is written in. */
const FORMS = [
  ['template', templateMachineSchema],
  ['coordinates', secondOrderMachineSchema],
  ['states', firstOrderMachineSchema],
] as const;

const CHOICE = '"template", or "coordinates" (second order), or "states" (first order)';

/** The schema of the form in which `machine` is written, or why none applies. */
export function machineForm(machine: unknown): { schema: z.ZodType<Machine> } | { message: string } {
  if (machine === undefined) return { message: `is missing; give a machine with ${CHOICE}` };
  if (typeof machine !== 'object' || machine === null || Array.isArray(machine)) {
    return { message: `must be a machine with ${CHOICE}` };
  }
  const present = FORMS.filter(([key]) => Object.hasOwn(machine, key));
  if (present.length === 0) return { message: `must have ${CHOICE}` };
  if (present.length > 1) {
    const keys = present.map(([key]) => `"${key}"`).join(' and ');
    return { message: `must be written in one form, but has ${keys}; keep one of them` };
  }
  return { schema: present[0][1] };
}
