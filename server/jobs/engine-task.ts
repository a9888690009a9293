import type { Fault } from '../../shared/contracts';
import type { RunFigures } from '../../shared/contracts/api';
import type { FlatMap } from './flat-map';

/** How fine a map is to be. */
export interface MapGrid {
  readonly columns: number;
  readonly rows: number;
  /** The finest grid up to this one that is done by then, in the system's milliseconds; left out: this one. */
  readonly until?: number | undefined;
}

/** What a thread is asked to compute. Studies come as text: reading them is its work too. */
export type EngineTask =
  | { readonly kind: 'version' }
  | { readonly kind: 'analysis'; readonly study: string; readonly map: boolean }
  | { readonly kind: 'map'; readonly study: string; readonly grid: MapGrid };

export interface AnalysisAnswer {
  readonly engineVersion: string;
  /** Text of the result, without the map. */
  readonly result: string;
  readonly figures: RunFigures;
  /** Where it was asked for and the study has one. */
  readonly map: FlatMap | undefined;
}

/** Errors of a study come back as data: of a class nothing but the message would arrive. */
export type EngineReply =
  | { readonly kind: 'version'; readonly version: string }
  | { readonly kind: 'analysis'; readonly answer: AnalysisAnswer }
  | { readonly kind: 'map'; readonly text: string }
  | { readonly kind: 'faults'; readonly faults: readonly Fault[] }
  | { readonly kind: 'stopped' };

export interface EngineOrder {
  readonly task: EngineTask;
  readonly control: SharedArrayBuffer;
}
