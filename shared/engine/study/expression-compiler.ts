import { quoted, type Matrix, type PathPart, type Scalar, type Vector } from '../../contracts';
import { isBinary, ProgramBuilder, type Expression, type NodeId, type Operation } from '../../expressions';
import type { FaultList } from './fault-list';
import { atColumn, parseScalar } from './parse-scalar';

/**
 * Deepest chain of operations, one definition put into the other, that is read: later passes descend it by recursion.
 * One expression of the greatest length stays below it.
 */
const DEEPEST_CHAIN = 1500;

const PARTIAL_OPERATIONS: ReadonlySet<Operation> = new Set(['divide', 'power', 'sqrt', 'log', 'tan']);

/** A node and the first place of the study that made it. */
export interface NodeSite {
  readonly node: NodeId;
  readonly path: readonly PathPart[];
}

/** Puts a study's expressions into one program, and notes where each came from. */
export class ExpressionCompiler {
  readonly program = new ProgramBuilder();
  /** Operations that are not defined everywhere. */
  readonly partial: NodeSite[] = [];
  /** Every expression as a whole. */
  readonly roots: NodeSite[] = [];
  /** Whether every expression so far could be compiled. */
  complete = true;
  private readonly nodes = new Map<string, NodeId | undefined>();
  private readonly depths: number[] = [];

  constructor(private readonly faults: FaultList) {}

  /** Gives a name its meaning; undefined for a name with a fault of its own. */
  define(name: string, node: NodeId | undefined): void {
    this.nodes.set(name, node);
  }

  matrix(rows: Matrix, path: readonly PathPart[]): NodeId[][] {
    return rows.map((row, index) => this.vector(row, [...path, index]));
  }

  vector(entries: Vector, path: readonly PathPart[]): NodeId[] {
    return entries.map((entry, index) => this.scalar(entry, [...path, index]));
  }

  /** The node of a number or expression; 0 for one that is left out, and, with `complete` false, for a faulty one. */
  scalar(scalar: Scalar | undefined, path: readonly PathPart[]): NodeId {
    const tree = scalar === undefined ? undefined : parseScalar(scalar, path, this.faults);
    if (tree === undefined) {
      if (scalar !== undefined) this.complete = false;
      return this.program.zero;
    }
    return this.expression(tree, path) ?? this.program.zero;
  }

  /** The node of an expression; undefined, with `complete` false, for a faulty one. */
  expression(tree: Expression, path: readonly PathPart[]): NodeId | undefined {
    const { program } = this;
    const first = program.operations.length;
    let usable = true;
    const node = program.expression(tree, (name, position) => {
      const known = this.nodes.get(name);
      if (known !== undefined) return known;
      usable = false;
      if (!this.nodes.has(name)) {
        this.faults.add(path, atColumn(`unknown parameter or definition ${quoted(name)}`, position));
      }
      return program.zero;
    });
    if (usable && this.depth(node) > DEEPEST_CHAIN) {
      usable = false;
      this.faults.add(path, `chains more than ${DEEPEST_CHAIN} operations through definitions`);
    }
    if (!usable) {
      this.complete = false;
      return undefined;
    }
    for (let id = first; id < program.operations.length; id++) {
      if (PARTIAL_OPERATIONS.has(program.operations[id])) this.partial.push({ node: id, path });
    }
    this.roots.push({ node, path });
    return node;
  }

  private depth(node: NodeId): number {
    const { operations, left, right } = this.program;
    for (let id = this.depths.length; id <= node; id++) {
      const operation = operations[id];
      if (operation === 'constant' || operation === 'parameter') this.depths.push(0);
      else {
        const second = isBinary(operation) ? this.depths[right[id]] : 0;
        this.depths.push(1 + Math.max(this.depths[left[id]], second));
      }
    }
    return this.depths[node];
  }
}
