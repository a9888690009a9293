import type { NodeId, Program } from '../../expressions';

/** One coefficient of the polynomial matrix: `node` · s^power at (row, column). */
export interface LoopEntry {
  readonly row: number;
  readonly column: number;
  readonly power: number;
  readonly node: NodeId;
  /** Index of the law whose output this entry belongs to: it is multiplied by κ where that loop is broken; −1: none. */
  readonly law: number;
}

/** A delay in the loop, for the phase its Padé form lacks. `lengthFactor` · node is its length in seconds. */
export interface LoopDelay {
  readonly node: NodeId;
  readonly padeOrder: number;
  /** The law in whose path it lies; −1 for the sensors, which every law reads. */
  readonly law: number;
}

/**
 * The closed loop as P(s, p) z = 0 with r = w = 0: machine, control laws and hardware as rows, each signal that has
 * a state (and each commanded input) as a column. det P is the characteristic polynomial of the whole, including
 * the poles that no input reaches.
 */
export interface LoopMatrix {
  readonly program: Program;
  readonly size: number;
  readonly entries: readonly LoopEntry[];
  /** Highest power of s in each column; 0: an algebraic signal. */
  readonly columnDegrees: readonly number[];
  /** Order of the loop: the sum of the column degrees. */
  readonly order: number;
  readonly lawInputs: readonly string[];
  readonly delays: readonly LoopDelay[];
}

/** A linear combination of columns: Σ node · s^power · z_column. */
export type Signal = readonly { readonly column: number; readonly power: number; readonly node: NodeId }[];
