import type { MapMeasure, MapOthers, Measure, ParameterKind, Warning } from '../../contracts';
import type { ProgramBuilder } from '../../expressions';
import type { Unit } from '../../units';
import type { ComposedLoop } from '../loop/composed';

/** A parameter in SI; its place in the list is its index in the program. */
export interface ComposedParameter {
  readonly id: string;
  /** The unit of the study's values and of results in this parameter; undefined: SI. */
  readonly unit: Unit | undefined;
  readonly nominal: number;
  /** low = high = nominal for an exact parameter. */
  readonly low: number;
  readonly high: number;
  /** −∞ and ∞ where the study gives none. */
  readonly minimum: number;
  readonly maximum: number;
  readonly hasBand: boolean;
  readonly kind: ParameterKind;
}

export interface ComposedRequirement {
  readonly measure: Measure;
  /** SI; 0 for stability. */
  readonly limit: number;
  /** The law whose loop is broken, for margins; −1 where the study has no law. */
  readonly law: number;
}

export interface ComposedTest {
  readonly name: string;
  readonly factor: number;
  /** undefined: those of the study. */
  readonly requirements: readonly ComposedRequirement[] | undefined;
}

/** What the plate says and its steps, in SI, as far as the study gives them. */
export interface ComposedRating {
  readonly payload: number | undefined;
  readonly step: number | undefined;
  readonly tests: readonly ComposedTest[];
}

/** Two parameters, by index, and their ranges in SI. */
export interface ComposedMap {
  readonly x: number;
  readonly xFrom: number;
  readonly xTo: number;
  readonly y: number;
  readonly yFrom: number;
  readonly yTo: number;
  readonly columns: number;
  readonly rows: number;
  readonly measure: MapMeasure;
  readonly others: MapOthers;
}

/** A study as the engine computes with it: SI values, entries as nodes of one program, nothing left to be checked. */
export interface ComposedStudy {
  readonly program: ProgramBuilder;
  readonly parameters: readonly ComposedParameter[];
  /** Index of the payload. */
  readonly payload: number | undefined;
  /** SI, only where the study gives them, within the payload's minimum and maximum. */
  readonly searchUpTo: number | undefined;
  readonly searchDownTo: number | undefined;
  readonly loop: ComposedLoop;
  /** Stability first, each measure of each law once. */
  readonly requirements: readonly ComposedRequirement[];
  readonly rating: ComposedRating | undefined;
  readonly map: ComposedMap | undefined;
  /** Whether the machine is defined everywhere in the bands could neither be shown nor refuted. */
  readonly boundsUndecided: boolean;
  readonly warnings: readonly Warning[];
}
