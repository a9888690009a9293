import * as z from './zod';
import { needs, oneOf } from './message';
import { referenceSchema, scalarWith } from './scalar';

export const MEASURES = [
  'stability',
  'decayRate',
  'dampingRatio',
  'gainMargin',
  'phaseMargin',
  'modulusMargin',
] as const;
export type Measure = (typeof MEASURES)[number];

/** The measures that a level belongs to. */
export type LevelMeasure = Exclude<Measure, 'stability'>;

const level = scalarWith();

const poleRequirement = <M extends 'decayRate' | 'dampingRatio'>(measure: M) =>
  z.object({ measure: z.literal(measure), atLeast: level });

/** `input` is where the loop is broken; the first law's input unless said. */
const marginRequirement = <M extends 'gainMargin' | 'phaseMargin' | 'modulusMargin'>(measure: M) =>
  z.object({ measure: z.literal(measure), atLeast: level, input: referenceSchema.optional() });

const measureWord = oneOf(MEASURES);

export const requirementSchema = z.discriminatedUnion(
  'measure',
  [
    z.object({ measure: z.literal('stability') }),
    poleRequirement('decayRate'),
    poleRequirement('dampingRatio'),
    marginRequirement('gainMargin'),
    marginRequirement('phaseMargin'),
    marginRequirement('modulusMargin'),
  ],
  {
    error: (issue) =>
      typeof issue.input === 'object' && issue.input !== null && !Array.isArray(issue.input)
        ? measureWord({ input: 'measure' in issue.input ? issue.input.measure : undefined })
        : needs('a requirement such as { "measure": "stability" }')(issue),
  },
);
export type Requirement = z.infer<typeof requirementSchema>;

export const requirementsSchema = z
  .array(requirementSchema, { error: needs('a list of requirements') })
  .min(1, { error: 'must list at least one requirement' });

/**
 * Why a value cannot be the level of a measure; undefined if it can. Decay rate in 1/s ≥ 0; damping ratio in [0, 1);
 * gain margin a factor ≥ 1; phase margin in rad in (0, π); modulus margin in (0, 1].
 */
export function requirementLevelFault(measure: LevelMeasure, value: number): string | undefined {
  if (!Number.isFinite(value)) return 'must be finite';
  switch (measure) {
    case 'decayRate':
      return value >= 0 ? undefined : 'is in 1/s and must not be negative';
    case 'dampingRatio':
      return value >= 0 && value < 1 ? undefined : 'must be at least 0 and below 1';
    case 'gainMargin':
      return value >= 1 ? undefined : 'is a factor and must be at least 1';
    case 'phaseMargin':
      if (value > 0 && value < Math.PI) return undefined;
      return value > 0 ? phaseMarginInDegrees(value) : 'is in rad and must be above 0 and below π';
    case 'modulusMargin':
      return value > 0 && value <= 1 ? undefined : 'must be above 0 and at most 1';
  }
}

/** A level of π or more was almost always meant in degrees: say what those degrees are. */
function phaseMarginInDegrees(value: number): string {
  const degrees = value < 180 ? value : 45;
  return `is in rad and must be below π; ${degrees} degrees are ${((degrees * Math.PI) / 180).toFixed(4)}`;
}
