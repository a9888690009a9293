import type { LevelMeasure } from '../../../shared/contracts';
import type { Term } from './term';

/** A parameter as the study writes it; SI value = value · siFactor. */
export interface ModelParameter {
  readonly id: string;
  unit?: string;
  siFactor: number;
  nominal: number;
  low: number;
  high: number;
  minimum?: number;
  maximum?: number;
  kind?: 'tolerance' | 'use' | 'wear';
}

export interface SecondOrderModel {
  readonly order: 2;
  readonly names: readonly string[];
  readonly mass: Term[][];
  readonly damping: Term[][];
  readonly stiffness: Term[][];
  readonly inputs: Record<string, Term[]>;
  readonly outputs: Record<string, { position?: Term[]; velocity?: Term[] }>;
}

export interface FirstOrderModel {
  readonly order: 1;
  readonly names: readonly string[];
  readonly descriptor?: Term[][];
  readonly dynamics: Term[][];
  readonly inputs: Record<string, Term[]>;
  readonly outputs: Record<string, Term[]>;
}

export type MachineModel = SecondOrderModel | FirstOrderModel;

export type LawModel =
  | { law: 'pid'; input: string; output: string; kp: Term; ki?: Term; kd?: Term; derivativeTime?: Term }
  | {
      law: 'state-feedback';
      input: string;
      gains: { state: string; gain: Term }[];
      integral?: { output: string; gain: Term };
    }
  | { law: 'transfer-function'; input: string; output: string; numerator: Term[]; denominator: Term[] }
  | { law: 'state-space'; input: string; output: string; a: Term[][]; b: Term[]; c: Term[]; d: Term };

export interface HardwareModel {
  lag?: Term;
  delay?: Term;
  padeOrder?: number;
}

/** A requirement with its level as a number. */
export type ModelRequirement =
  { measure: 'stability' } | { measure: LevelMeasure; atLeast: number; input?: string };

/** Everything that a study says, with entries in both forms. */
export interface StudyModel {
  readonly name: string;
  machine: MachineModel;
  readonly parameters: ModelParameter[];
  readonly definitions: Map<string, string>;
  payload?: number;
  searchUpTo?: number;
  searchDownTo?: number;
  laws: LawModel[];
  actuators: (HardwareModel | undefined)[];
  sensor?: HardwareModel;
  sampling?: { period: Term; padeOrder?: number };
  requirements: ModelRequirement[];
}

export function siValues(model: StudyModel, values: ArrayLike<number>): Float64Array {
  return Float64Array.from(model.parameters, ({ siFactor }, i) => values[i] * siFactor);
}

export const nominalValues = (model: StudyModel): Float64Array =>
  Float64Array.from(model.parameters, ({ nominal }) => nominal);
