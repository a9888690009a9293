import { evaluateInterval, type NodeId, type Program } from '../../../expressions';
import { cos, isDomainIssue, pointInterval, type Interval } from '../../../expressions/interval';
import { centreOf, cornersOf, halves, pointOfSignChange, type BandBox } from './band-box';
import { ANY, intervalDeterminant } from './interval-determinant';
import { subProgram } from './sub-program';
import {
  isBroken,
  MET,
  OPEN,
  subjectNodes,
  type Decision,
  type SignCondition,
  type Subject,
} from './sign-condition';

/** Most boxes for one condition. */
const MOST_BOXES = 4000;

/** Most node evaluations for one condition, so that a long expression gets fewer boxes. */
const MOST_WORK = 1_000_000;

/** Corners are tried along so many variables. */
const CORNER_VARIABLES = 6;

/** So many changes of sign without a zero between are looked into. */
const MOST_JUMPS = 4;

/** Where a condition is to be decided. */
export interface BandPoint {
  /** Nominal values of all parameters, SI. */
  readonly nominals: readonly number[];
  /** Indices of the parameters with a band that enter. */
  readonly variables: readonly number[];
  /** Their bands. */
  readonly box: BandBox;
}

/**
 * Branch and bound: interval arithmetic excludes boxes in which the condition cannot fail; points at which it fails
 * for certain, or between which a continuous quantity changes its sign, refute it.
 */
export class IntervalSearch {
  private readonly program: Program;
  private readonly placeOf: ReadonlyMap<NodeId, NodeId>;
  private readonly parameters: Interval[];
  private positive: readonly number[] | undefined;
  private negative: readonly number[] | undefined;
  private jumps = 0;

  constructor(
    program: Program,
    private readonly condition: SignCondition,
    private readonly where: BandPoint,
  ) {
    const { program: own, placeOf } = subProgram(program, subjectNodes(condition.subject));
    this.program = own;
    this.placeOf = placeOf;
    this.parameters = where.nominals.map(pointInterval);
  }

  /** Whether one look at the whole box shows that the condition holds. */
  isMetOnWhole(): boolean {
    const { low, high } = this.where.box;
    return isMet(this.condition.sign, this.enclose(low, high));
  }

  decide(): Decision {
    const { box, nominals, variables } = this.where;
    const { sign } = this.condition;
    const samples = [variables.map((index) => nominals[index]), ...cornersOf(box, CORNER_VARIABLES)];
    for (const sample of samples) {
      const point = this.refutedAt(sample);
      if (point !== undefined) return { outcome: 'broken', point };
    }
    const budget = Math.min(MOST_BOXES, Math.ceil(MOST_WORK / this.program.operations.length));
    const queue = [box];
    let open = false;
    for (let next = 0; next < queue.length; next++) {
      if (next >= budget) return OPEN;
      const current = queue[next];
      if (isMet(sign, this.enclose(current.low, current.high))) continue;
      const point = this.refutedAt(centreOf(current));
      if (point !== undefined) return { outcome: 'broken', point };
      const parts = halves(current, box, () => true);
      if (parts === undefined) open = true;
      else queue.push(...parts);
    }
    return open ? OPEN : MET;
  }

  /** A point that refutes the condition, found by evaluating at another one. */
  private refutedAt(point: readonly number[]): readonly number[] | undefined {
    const sign = this.signAt(point);
    if (sign === undefined) return undefined;
    if (isBroken(this.condition.sign, sign)) return point;
    if (this.condition.sign !== 'nonzero') return undefined;
    if (sign > 0) this.positive ??= point;
    else this.negative ??= point;
    return this.betweenSigns();
  }

  /** Where the quantity passes through zero; undefined where it changes its sign by a jump or through a pole. */
  private betweenSigns(): readonly number[] | undefined {
    const { positive, negative } = this;
    if (positive === undefined || negative === undefined || this.jumps === MOST_JUMPS) return undefined;
    const found = pointOfSignChange(positive, negative, (point) => this.signAt(point));
    const size = (at: readonly number[]): number => {
      const { low, high } = this.enclose(at, at);
      return Math.max(-low, high);
    };
    if (size(found) < Math.min(size(positive), size(negative))) return found;
    this.negative = undefined;
    this.jumps++;
    return undefined;
  }

  private signAt(point: readonly number[]): number | undefined {
    const { low, high } = this.enclose(point, point);
    if (low > 0) return 1;
    if (high < 0) return -1;
    return low === 0 && high === 0 ? 0 : undefined;
  }

  private enclose(low: readonly number[], high: readonly number[]): Interval {
    this.where.variables.forEach((index, i) => (this.parameters[index] = { low: low[i], high: high[i] }));
    const values = evaluateInterval(this.program, this.parameters);
    return subjectInterval(this.condition.subject, (node) => {
      const value = values[this.placeOf.get(node) ?? 0];
      return isDomainIssue(value) ? ANY : value;
    });
  }
}

function subjectInterval(subject: Subject, valueOf: (node: NodeId) => Interval): Interval {
  switch (subject.kind) {
    case 'node':
      return valueOf(subject.node);
    case 'cosine':
      return cos(valueOf(subject.node));
    case 'determinant':
      return intervalDeterminant(subject.rows.map((row) => row.map(valueOf)));
  }
}

function isMet(required: SignCondition['sign'], { low, high }: Interval): boolean {
  if (required === 'nonnegative') return low >= 0;
  return low > 0 || (required === 'nonzero' && high < 0);
}
