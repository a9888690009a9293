import type { Measure } from '../../contracts';
import type { BoundaryPolynomials } from '../polynomial/bernstein-form';
import type { LoopProbe } from './loop-probe';

/** Why a point certainly fails. */
export interface CertainFailure {
  /** A pole has left through infinity: the leading coefficient has vanished or changed its sign. */
  readonly throughInfinity: boolean;
}

/** A requirement as a search for failing points sees it. */
export interface SearchedRequirement {
  readonly measure: Measure;
  readonly limit: number;
  readonly probe: LoopProbe;
  /** Negative where the requirement fails, in double precision: see `requirementValue`. */
  value(point: ArrayLike<number>): number;
  /** The failure, where it is certain. */
  failsCertainly(point: ArrayLike<number>): CertainFailure | undefined;
}

/** A requirement that can be proved on boxes. */
export interface ProvableRequirement extends SearchedRequirement {
  readonly polynomials: BoundaryPolynomials;
  /** True when an exact count shows the requirement's poles inside at this point. */
  isInside(point: ArrayLike<number>): boolean;
}
