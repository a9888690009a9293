import type { Fault, Result } from '../../../shared/contracts';

/**
 * Answers computed in the browser while something is dragged; what is kept, shown to a reviewer or exported is the
 * server's. Each holds all that the one before it held. `studyHash` is not among them. Before it is complete the
 * verdict comes from a search of the bands as they stand, and its failing point may move once more.
 */
export type LiveAnswer =
  | { readonly faults: readonly Fault[] }
  | { readonly result: Partial<Result> & Pick<Result, 'nominal'>; readonly complete: boolean };

/** How many nodes a map has along each axis, ends included. */
export interface LiveGrid {
  readonly columns: number;
  readonly rows: number;
}
