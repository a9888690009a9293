import { nextDown } from './rounding';

/**
 * A lower bound of the exact value of which `computed` is an approximation within `ulps` units in
 * the last place. One step more than `ulps`, because the exact value may lie across a power of
 * two, where its unit is twice that of the computed value.
 */
export function widenDown(computed: number, ulps: number): number {
  let bound = nextDown(computed);
  for (let step = 0; step < ulps; step += 1) bound = nextDown(bound);
  return bound;
}

/** The upper bound that goes with `widenDown`. */
export function widenUp(computed: number, ulps: number): number {
  return -widenDown(-computed, ulps);
}
