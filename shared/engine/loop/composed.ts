import type { NodeId, ProgramBuilder } from '../../expressions';

/** A machine whose entries are nodes of a program: Σ_k coefficients[k] s^k x = Σ inputs · u, by power of s. */
export interface ComposedMachine {
  /** 2: M q̈ + D q̇ + K q; 1: E ẋ − A x. Also the number of states per unknown. */
  readonly order: 1 | 2;
  /** Coordinates or states, in column order. */
  readonly names: readonly string[];
  /** [K, D, M] or [−A, E], each n×n. */
  readonly coefficients: readonly (readonly (readonly NodeId[])[])[];
  readonly inputs: ReadonlyMap<string, readonly NodeId[]>;
  readonly disturbances: ReadonlyMap<string, readonly NodeId[]>;
  readonly outputs: ReadonlyMap<string, ComposedOutput>;
}

/** y = Σ position·x + Σ velocity·ẋ; a first-order machine has no velocity part. */
export interface ComposedOutput {
  readonly position: readonly NodeId[];
  readonly velocity: readonly NodeId[];
}

export interface ComposedPid {
  readonly law: 'pid';
  readonly input: string;
  readonly output: string;
  readonly kp: NodeId;
  readonly ki: NodeId;
  readonly kd: NodeId;
  readonly derivativeTime: NodeId;
}

export interface ComposedStateFeedback {
  readonly law: 'state-feedback';
  readonly input: string;
  /** Gain by unknown and number of dots: u = −Σ gain · x^(dots). */
  readonly gains: readonly { readonly unknown: number; readonly dots: 0 | 1; readonly gain: NodeId }[];
  readonly integral: { readonly output: string; readonly gain: NodeId } | undefined;
}

export interface ComposedTransferFunction {
  readonly law: 'transfer-function';
  readonly input: string;
  readonly output: string;
  /** Ascending powers of s. */
  readonly numerator: readonly NodeId[];
  readonly denominator: readonly NodeId[];
}

export interface ComposedStateSpace {
  readonly law: 'state-space';
  readonly input: string;
  readonly output: string;
  readonly a: readonly (readonly NodeId[])[];
  readonly b: readonly NodeId[];
  readonly c: readonly NodeId[];
  readonly d: NodeId;
}

export type ComposedLaw = ComposedPid | ComposedStateFeedback | ComposedTransferFunction | ComposedStateSpace;

/** A lag 1/(1 + lag·s) and a delay in Padé form, in series; node 0 of the program (the constant 0) for none. */
export interface ComposedHardware {
  readonly lag: NodeId;
  readonly delay: NodeId;
  readonly padeOrder: number;
}

export interface ComposedLoop {
  readonly program: ProgramBuilder;
  readonly machine: ComposedMachine;
  readonly laws: readonly ComposedLaw[];
  /** Law by law. */
  readonly actuators: readonly ComposedHardware[];
  readonly sensor: ComposedHardware;
  /** The delay of a digital controller, 1.5 periods; lag is always 0. */
  readonly sampling: ComposedHardware;
}
