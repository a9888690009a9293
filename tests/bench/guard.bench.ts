import { payloadFamily } from '../../shared/engine/contact/search-family';
import type { BernsteinKernel } from '../../shared/engine/polynomial/bernstein-kernel';
import { ExclusionTest } from '../../shared/engine/polynomial/exclusion-test';
import type { Example } from './examples';
import { StudySearch } from './study-search';
import { finish, median, timed } from './timing';
import { UnguardedKernel } from './unguarded-kernel';

const ROUNDS = 41;
const WARM_ROUNDS = 10;
/** Proofs of all examples are repeated until a round has about this many boxes. */
const BOXES_PER_ROUND = 4000;
const MOST_BOXES = 20_000;

type Kernel = Pick<BernsteinKernel, 'length' | 'excludes' | 'split' | 'splitDimension'> & {
  /** Undefined where no radii are kept that could tell. */
  isNoise?: BernsteinKernel['isNoise'];
};

/** The kernel with one direction for all of a box, as the side without radii has it: the same work but for the radii. */
function jointly(kernel: BernsteinKernel): Kernel {
  const test = new ExclusionTest(kernel.size, kernel.columns, kernel.shape);
  return {
    length: kernel.length,
    excludes: (box) => test.excludesJointly(box),
    split: (box, right, dimension) => kernel.split(box, right, dimension),
    splitDimension: (box, allowed) => kernel.splitDimension(box, allowed),
    isNoise: (box) => kernel.isNoise(box),
  };
}

/** One proof: that a requirement holds up to the proved payload with every other parameter in its band. */
class Proof {
  private readonly pool: Float64Array[] = [];
  private readonly stack: Float64Array[] = [];
  private readonly allowed: Uint8Array;

  constructor(
    private readonly kernel: Kernel,
    private readonly root: Float64Array,
    wide: readonly boolean[],
  ) {
    this.allowed = Uint8Array.from([...wide, true], (isWide) => (isWide ? 1 : 0));
  }

  /** Excludes or splits until nothing is left; the number of boxes. */
  run(): number {
    const { kernel, pool, stack, allowed } = this;
    stack.push(this.copy(this.root));
    let boxes = 0;
    for (let box = stack.pop(); box !== undefined; box = stack.pop()) {
      boxes++;
      if (kernel.excludes(box)) {
        pool.push(box);
        continue;
      }
      if (boxes > MOST_BOXES || kernel.isNoise?.(box) === true) return NaN;
      const right = pool.pop() ?? new Float64Array(kernel.length);
      kernel.split(box, right, kernel.splitDimension(box, allowed));
      stack.push(right, box);
    }
    return boxes;
  }

  private copy(box: Float64Array): Float64Array {
    const data = this.pool.pop() ?? new Float64Array(this.kernel.length);
    data.set(box);
    return data;
  }
}

interface Pair {
  readonly guarded: Proof;
  readonly unguarded: Proof;
  readonly boxes: number;
  /** The requirement's measure. */
  readonly measure: string;
}

/** The proofs of one example's largest payload, one per requirement, with error radii and without. */
function proofsOf({ study }: Example): Pair[] {
  const searches = new StudySearch(study);
  const { space, search, model, searchedUpTo } = searches;
  if (!search.proved || space.payload < 0 || search.nominalContact() !== undefined) return [];
  const { provedTo } = finish(search.payload(searchedUpTo));
  if (provedTo === undefined) return [];
  const ranges = payloadFamily(space.variables, space.payload, searchedUpTo).rangesAt(provedTo);
  const wide = ranges.map(({ low, high }) => high > low);
  return study.requirements.flatMap((requirement) => {
    const polynomials = model.problem(requirement, searches.widest)?.polynomials;
    if (polynomials === undefined) return [];
    const { kernel } = polynomials;
    const root = new Float64Array(kernel.length);
    polynomials.load(root, ranges);
    const plain = new UnguardedKernel(kernel.shape);
    const guarded = new Proof(jointly(kernel), root, wide);
    const unguarded = new Proof(plain, root.subarray(0, plain.length), wide);
    const boxes = guarded.run();
    const plainBoxes = unguarded.run();
    if (!(boxes === plainBoxes)) {
      throw new Error(`${boxes} boxes with error radii, ${plainBoxes} without: the two are not comparable`);
    }
    return [{ guarded, unguarded, boxes, measure: requirement.measure }];
  });
}

/**
 * What the error radii cost: the time of all proofs of the examples (exclusion, choice of the dimension, splitting)
 * with the radii kept, grown and tested, by the time of the same boxes without them, each pair back to back.
 */
export function benchGuard(print: (line: string) => void, examples: readonly Example[]): void {
  print('error radii: proofs of the largest payload with them / without them');
  print('  requirement        boxes   µs a box   ratio');
  const all: Pair[] = [];
  for (const example of examples) all.push(...proofsOf(example));
  for (const measure of new Set(all.map((pair) => pair.measure))) {
    report(
      print,
      measure,
      all.filter((pair) => pair.measure === measure),
    );
  }
  report(print, 'all together', all);
}

function report(print: (line: string) => void, kind: string, pairs: readonly Pair[]): void {
  const boxes = pairs.reduce((sum, pair) => sum + pair.boxes, 0);
  const repeats = Math.ceil(BOXES_PER_ROUND / boxes);
  const runAll = (side: 'guarded' | 'unguarded') => () => {
    for (let i = 0; i < repeats; i++) for (const pair of pairs) pair[side].run();
  };
  const guarded = runAll('guarded');
  const unguarded = runAll('unguarded');
  for (let i = 0; i < WARM_ROUNDS; i++) {
    guarded();
    unguarded();
  }
  const times: number[] = [];
  const ratios: number[] = [];
  for (let round = 0; round < ROUNDS; round++) {
    const withRadii = timed(guarded);
    times.push(withRadii);
    ratios.push(withRadii / timed(unguarded));
  }
  const each = (median(times) * 1000) / (boxes * repeats);
  print(
    `  ${kind.padEnd(16)} ${String(boxes).padStart(7)} ${each.toFixed(2).padStart(10)} ${median(ratios).toFixed(2).padStart(7)}`,
  );
}
