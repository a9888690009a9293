import type { Fault, MapAnswer } from '../../../shared/contracts';
import type { LiveAnswer, LiveGrid } from './live-answer';

/** What the page asks of the worker. A newer request ends the older one of its kind, ids rise. */
export type EngineRequest =
  | { readonly kind: 'live'; readonly id: number; readonly study: unknown }
  | { readonly kind: 'map'; readonly id: number; readonly study: unknown; readonly grid: LiveGrid }
  | { readonly kind: 'cancel'; readonly id: number };

/** What the worker answers. Every request that is not cancelled ends with `done`, `faults` or `broken`. */
export type EngineReply =
  | { readonly kind: 'live'; readonly id: number; readonly answer: LiveAnswer }
  | { readonly kind: 'map'; readonly id: number; readonly map: MapAnswer }
  /** Nothing more comes: everything is computed, or a newer request took its place. */
  | { readonly kind: 'done'; readonly id: number }
  | { readonly kind: 'faults'; readonly id: number; readonly faults: readonly Fault[] }
  /** An error of the engine's own. */
  | { readonly kind: 'broken'; readonly id: number; readonly message: string };
