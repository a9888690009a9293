import type { Measure, Proof, Verdict } from '../../shared/contracts';

/** provedTo and failsAt, in the payload's unit; what limits, where something fails. */
type Sides = readonly [provedTo: number | null, failsAt: number | null, requirement?: Measure];

export interface ExpectedFigures {
  readonly verdict: Verdict;
  readonly proof: Proof;
  readonly largest: Sides;
  readonly smallest: Sides;
  readonly stretch: Sides;
  readonly plate?: number;
}

/**
 * The main figures of the studies under examples/, six digits of each, as this program computed them: they are here so
 * that a change of an answer is seen, and not a reference from outside. Raise the engine's version with such a change.
 */
export const expectedFigures: Readonly<Record<string, ExpectedFigures>> = {
  'balancing-carrier-two-riders': {
    verdict: 'holds',
    proof: 'proved',
    largest: [165.332, 165.498, 'modulusMargin'],
    smallest: [15, null],
    stretch: [1.96138, 1.96334, 'modulusMargin'],
  },
  'hydraulic-table': {
    verdict: 'holds',
    proof: 'proved',
    largest: [12, null],
    smallest: [0, null],
    stretch: [1.33408, 1.33542, 'gainMargin'],
  },
  'lift-table-long-column': {
    verdict: 'holds',
    proof: 'proved',
    largest: [1284.91, 1286.2, 'modulusMargin'],
    smallest: [0, null],
    stretch: [1.11552, 1.11664, 'dampingRatio'],
  },
  'lift-table-plate': {
    verdict: 'holds',
    proof: 'proved',
    largest: [602.853, 603.456, 'phaseMargin'],
    smallest: [0, null],
    stretch: [1.34192, 1.34326, 'phaseMargin'],
    plate: 525,
  },
  'single-track-shuttle': {
    verdict: 'holds',
    proof: 'proved',
    largest: [909.413, 910.323, 'dampingRatio'],
    smallest: [0, null],
    stretch: [1.34754, 1.34889, 'dampingRatio'],
  },
  'suspended-seat': {
    verdict: 'fails',
    proof: 'proved',
    largest: [400, null],
    smallest: [52.3846, 52.3046, 'modulusMargin'],
    stretch: [0.867852, 0.86872, 'modulusMargin'],
  },
  'swing-arm-carrier': {
    verdict: 'holds',
    proof: 'sampled',
    largest: [56.0843, 56.1404, 'dampingRatio'],
    smallest: [0, null],
    stretch: [1.51284, 1.51436, 'dampingRatio'],
  },
  'transfer-cart-digital': {
    verdict: 'holds',
    proof: 'proved',
    largest: [3.56703, 3.5706, 'gainMargin'],
    smallest: [0, null],
    stretch: [1.08598, 1.08707, 'gainMargin'],
  },
  'two-column-platform': {
    verdict: 'holds',
    proof: 'proved',
    largest: [1822.79, 1824.62, 'dampingRatio'],
    smallest: [0, null],
    stretch: [1.01783, 1.01885, 'dampingRatio'],
  },
  'workshop-hoist': {
    verdict: 'fails',
    proof: 'proved',
    largest: [1396.09, 1397.49, 'dampingRatio'],
    smallest: [40, null],
    stretch: [0.889787, 0.890678, 'dampingRatio'],
  },
};
