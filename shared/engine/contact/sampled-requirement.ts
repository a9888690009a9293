import type { Measure } from '../../contracts';
import type { LoopProbe } from './loop-probe';
import { requirementValue } from './requirement-value';
import type { CertainFailure, SearchedRequirement } from './searched-requirement';

/**
 * A requirement of a loop that is not rational in its tolerances: known at points in double precision only.
 * Whatever follows from it is "sampled", never "proved".
 */
export class SampledRequirement implements SearchedRequirement {
  constructor(
    readonly measure: Measure,
    readonly limit: number,
    readonly probe: LoopProbe,
  ) {}

  value(point: ArrayLike<number>): number {
    this.probe.visit(point);
    return requirementValue(this.probe, this.measure, this.limit);
  }

  failsCertainly(point: ArrayLike<number>): CertainFailure | undefined {
    return this.value(point) < 0 ? { throughInfinity: !this.probe.regular } : undefined;
  }
}
