import type { Range } from '../polynomial/bernstein-form';
import { BoxHeap, type OpenBox } from './box-heap';
import type { SearchFamily } from './search-family';
import type { ProvableRequirement } from './searched-requirement';

/** How the search of one box ended. */
export type BoxOutcome =
  | { readonly kind: 'proved' }
  /** A certified failing point. */
  | { readonly kind: 'contact'; readonly point: Float64Array }
  /** Undecided from this objective on; `share` of the box's volume is open. */
  | { readonly kind: 'open'; readonly objective: number; readonly share: number };

/** Work done by a search, counted in boxes; the caller's budget ends it. */
export interface BoxBudget {
  boxes: number;
  limit: number;
}

/** Narrowest fraction of the root box to which a variable is split, 2⁻³⁰, and t, 2⁻⁴⁸. */
const NARROWEST_VARIABLE = 9.313225746154785e-10;
const NARROWEST_TIME = 3.552713678800501e-15;

/** After this many boxes of one search the least value seen is followed downhill for the first time. */
const FIRST_DESCENT = 64;
/** First step of the descent, as a share of the searched range, and how often it is shortened or repeated. */
const FIRST_STEP = 0.0625;
const DESCENT_ROUNDS = 90;

/**
 * Shows that a requirement holds on a whole box, or finds a failing point in it: best first (smallest objective),
 * exclusion test, else a look at the centre, else a split. Yields once per box, so that the caller can stop, resume
 * or show progress at any point; the course does not depend on when it is resumed.
 */
export function* proveBox(
  problem: ProvableRequirement,
  family: SearchFamily,
  ranges: readonly Range[],
  budget: BoxBudget,
): Generator<void, BoxOutcome> {
  return yield* new BoxSearch(problem, family, ranges, budget).run();
}

class BoxSearch {
  private readonly heap = new BoxHeap();
  private readonly spare: Float64Array[] = [];
  private readonly dimensions: number;
  /** 1 for every dimension that has a width, t last. */
  private readonly splittable: Uint8Array;
  private readonly point: Float64Array;
  private readonly low: Float64Array;
  private readonly high: Float64Array;
  private order = 0;
  /** Looks at the least value seen so far are taken at these numbers of boxes, doubling. */
  private nextDescent = FIRST_DESCENT;
  private leastValue = Infinity;
  private readonly leastPoint: Float64Array;
  private openObjective = Infinity;
  private openShare = 0;

  constructor(
    private readonly problem: ProvableRequirement,
    private readonly family: SearchFamily,
    private readonly ranges: readonly Range[],
    private readonly budget: BoxBudget,
  ) {
    this.dimensions = ranges.length;
    this.splittable = Uint8Array.from([...ranges.map(({ low, high }) => (high > low ? 1 : 0)), 1]);
    this.point = new Float64Array(this.dimensions);
    this.leastPoint = new Float64Array(this.dimensions);
    this.low = new Float64Array(this.dimensions);
    this.high = new Float64Array(this.dimensions);
  }

  *run(): Generator<void, BoxOutcome> {
    const { kernel } = this.problem.polynomials;
    const start = this.budget.boxes;
    this.heap.push(this.rootBox());
    for (let box = this.heap.pop(); box !== undefined; box = this.heap.pop()) {
      if (this.budget.boxes >= this.budget.limit) {
        this.heap.push(box);
        break;
      }
      this.budget.boxes++;
      if (kernel.excludes(box.data)) {
        this.spare.push(box.data);
      } else {
        const contact = this.examine(box);
        if (contact !== undefined) return { kind: 'contact', point: contact };
      }
      if (this.budget.boxes - start === this.nextDescent) {
        this.nextDescent *= 2;
        const contact = this.descend();
        if (contact !== undefined) return { kind: 'contact', point: contact };
      }
      yield;
    }
    for (const box of this.heap.open) this.leaveOpen(box);
    if (this.openShare === 0) return { kind: 'proved' };
    return { kind: 'open', objective: this.openObjective, share: Math.min(1, this.openShare) };
  }

  private rootBox(): OpenBox {
    const data = new Float64Array(this.problem.polynomials.kernel.length);
    this.problem.polynomials.load(data, this.ranges);
    const low = new Float64Array(this.dimensions + 1);
    const high = new Float64Array(this.dimensions + 1).fill(1);
    return { data, low, high, objective: 0, order: this.order++, fresh: true };
  }

  /** Looks for a failing point in a box that was not excluded, then splits it or leaves it open. */
  private examine(box: OpenBox): Float64Array | undefined {
    const { problem } = this;
    const { kernel } = problem.polynomials;
    if (box.fresh) {
      this.placeCentre(box);
      const value = problem.value(this.point);
      if (value < 0 && problem.failsCertainly(this.point) !== undefined) return this.point.slice();
      if (value < this.leastValue) {
        this.leastValue = value;
        this.leastPoint.set(this.point);
      }
      box.fresh = false;
    }
    const dimension = kernel.isNoise(box.data) ? -1 : kernel.splitDimension(box.data, this.splittable);
    // Where the dimension that matters is as narrow as it gets, splitting another one only makes more open boxes.
    if (dimension < 0 || this.isNarrow(box, dimension)) return this.settle(box);
    this.split(box, dimension);
    return undefined;
  }

  private isNarrow(box: OpenBox, dimension: number): boolean {
    const narrowest = dimension === this.dimensions ? NARROWEST_TIME : NARROWEST_VARIABLE;
    return box.high[dimension] - box.low[dimension] <= narrowest;
  }

  /**
   * Follows the requirement's value downhill from the least one seen, coordinate by coordinate with shrinking steps:
   * a pocket much narrower than the open boxes is met this way long before they have shrunk to its size.
   */
  private descend(): Float64Array | undefined {
    const { problem, ranges, leastPoint: best, point } = this;
    if (this.leastValue === Infinity) return undefined;
    let step = FIRST_STEP;
    for (let round = 0; round < DESCENT_ROUNDS; round++) {
      let moved = false;
      for (let i = 0; i < this.dimensions; i++) {
        const { low, high } = ranges[i];
        for (const direction of [-step, step]) {
          point.set(best);
          point[i] = Math.max(low, Math.min(high, best[i] + direction * (high - low)));
          if (point[i] === best[i]) continue;
          const value = problem.value(point);
          // A gain that rounding alone could make is no reason to keep the step.
          if (value < this.leastValue - 1e-6 * Math.abs(this.leastValue)) {
            this.leastValue = value;
            best.set(point);
            moved = true;
            if (value < 0 && problem.failsCertainly(point) !== undefined) return point.slice();
          }
        }
      }
      if (!moved) step *= 0.5;
    }
    return undefined;
  }

  /** A box that splitting cannot decide: its centre and ends are counted exactly, then it stays open. */
  private settle(box: OpenBox): Float64Array | undefined {
    const { problem } = this;
    this.placeCentre(box);
    if (problem.failsCertainly(this.point) !== undefined) return this.point.slice();
    for (const end of [box.low, box.high]) {
      for (let i = 0; i < this.dimensions; i++) this.point[i] = this.at(i, end[i]);
      if (problem.failsCertainly(this.point) !== undefined) return this.point.slice();
    }
    this.leaveOpen(box);
    this.spare.push(box.data);
    return undefined;
  }

  private split(box: OpenBox, dimension: number): void {
    const data = this.spare.pop() ?? new Float64Array(box.data.length);
    this.problem.polynomials.kernel.split(box.data, data, dimension);
    const middle = 0.5 * (box.low[dimension] + box.high[dimension]);
    const right: OpenBox = {
      data,
      low: box.low.slice(),
      high: box.high.slice(),
      objective: box.objective,
      order: this.order++,
      fresh: box.fresh || dimension < this.dimensions,
    };
    right.low[dimension] = middle;
    box.high[dimension] = middle;
    box.order = this.order++;
    box.fresh = right.fresh;
    if (dimension < this.dimensions) {
      box.objective = this.objectiveBound(box);
      right.objective = this.objectiveBound(right);
    }
    this.heap.push(box);
    this.heap.push(right);
  }

  private objectiveBound(box: OpenBox): number {
    for (let i = 0; i < this.dimensions; i++) {
      this.low[i] = this.at(i, box.low[i]);
      this.high[i] = this.at(i, box.high[i]);
    }
    return this.family.objectiveBound(this.low, this.high);
  }

  private leaveOpen(box: OpenBox): void {
    // Ends of boxes are rounded when they are turned into SI values: stay a little on the safe side.
    const safe = box.objective - 1e-6 * this.family.gapAt(box.objective);
    this.openObjective = Math.min(this.openObjective, Math.max(0, safe));
    let share = 1;
    for (let i = 0; i <= this.dimensions; i++) share *= box.high[i] - box.low[i];
    this.openShare += share;
  }

  private placeCentre(box: OpenBox): void {
    for (let i = 0; i < this.dimensions; i++) this.point[i] = this.at(i, 0.5 * (box.low[i] + box.high[i]));
  }

  private at(variable: number, fraction: number): number {
    const { low, high } = this.ranges[variable];
    if (fraction === 0) return low;
    return fraction === 1 ? high : low + fraction * (high - low);
  }
}
