import type { Measure } from '../../contracts';
import type { SearchedRequirement } from './searched-requirement';

/** A failing point and the requirement that fails there. */
export interface Contact<R extends SearchedRequirement = SearchedRequirement> {
  readonly objective: number;
  readonly point: Float64Array;
  readonly problem: R;
}

/** A two-sided answer in terms of a family's objective. */
export interface TwoSided<R extends SearchedRequirement = SearchedRequirement> {
  /** Everything up to this objective holds; undefined: not even objective 0. */
  readonly provedTo: number | undefined;
  readonly contact: Contact<R> | undefined;
  /** Share of the searched box that is neither proved nor refuted, where `provedTo` ends at such a place. */
  readonly openShare: number | undefined;
  /** The requirement whose search stayed open. */
  readonly openMeasure: Measure | undefined;
}
