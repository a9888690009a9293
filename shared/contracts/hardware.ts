import * as z from './zod';
import { needs } from './message';
import { scalarSchema } from './scalar';

const PADE_MESSAGE = needs('an integer from 1 to 6');

/** Order of the Padé form that stands for a delay; 2 unless said. */
const padeOrderSchema = z
  .int({ error: PADE_MESSAGE })
  .min(1, { error: PADE_MESSAGE })
  .max(6, { error: PADE_MESSAGE });

const pathFields = {
  lag: scalarSchema.optional(),
  delay: scalarSchema.optional(),
  padeOrder: padeOrderSchema.optional(),
};

/** First-order lag and delay, both in s, between a law's output and the machine's input. */
export const actuatorSchema = z.object(pathFields, {
  error: needs('an object with lag, delay and padeOrder, each optional'),
});
export type Actuator = z.infer<typeof actuatorSchema>;

/** The same on every measured signal, each with a state of its own. */
export const sensorSchema = z.object(pathFields, {
  error: needs('an object with lag, delay and padeOrder, each optional'),
});
export type Sensor = z.infer<typeof sensorSchema>;

/** A digital controller that reads every `period` s: a delay of 1.5 periods. */
export const samplingSchema = z.object(
  { period: scalarSchema, padeOrder: padeOrderSchema.optional() },
  { error: needs('an object with period') },
);
export type Sampling = z.infer<typeof samplingSchema>;

export const actuatorsSchema = z.union([actuatorSchema, z.array(actuatorSchema)], {
  error: needs('an actuator, or a list of them law by law'),
});
export type Actuators = z.infer<typeof actuatorsSchema>;

/** Law by law, the actuator behind it; undefined where the study has none. */
export function actuatorsOf(actuator: Actuators | undefined, laws: number): (Actuator | undefined)[] {
  return Array.from({ length: laws }, (_, index) => (Array.isArray(actuator) ? actuator[index] : actuator));
}

export type HardwareQuantity = 'lag' | 'delay' | 'period' | 'derivativeTime';

/** Why a value cannot be a lag, delay, derivative time (s, ≥ 0) or sampling period (s, > 0); undefined if it can. */
export function hardwareFault(quantity: HardwareQuantity, value: number): string | undefined {
  if (!Number.isFinite(value)) return 'must be finite';
  if (quantity === 'period') return value > 0 ? undefined : 'must be above 0';
  return value >= 0 ? undefined : 'must not be negative';
}
