import { evaluateProgram, isBinary, type NodeId, type Program } from '../../expressions';

/**
 * Values of a program's nodes at the nominal point, and which of them vary. Follows a program that still grows, one
 * node's work per new node.
 */
export class NominalValues {
  private readonly values: number[] = [];
  private readonly varying: boolean[] = [];
  private readonly single = new Float64Array(3);

  /**
   * @param nominals values of all parameters, SI
   * @param varies whether the parameter with this index takes more than one value in the analysis
   */
  constructor(
    private readonly program: Program,
    private readonly nominals: ArrayLike<number>,
    private readonly varies: (parameter: number) => boolean,
  ) {}

  value(node: NodeId): number {
    this.follow(node);
    return this.values[node];
  }

  isVarying(node: NodeId): boolean {
    this.follow(node);
    return this.varying[node];
  }

  /** The value of a node that is the same everywhere in the analysis, else undefined. */
  constant(node: NodeId): number | undefined {
    return this.isVarying(node) ? undefined : this.values[node];
  }

  private follow(node: NodeId): void {
    const { operations, left, right, constants } = this.program;
    for (let id = this.values.length; id <= node; id++) {
      const operation = operations[id];
      if (operation === 'constant') this.push(constants[id], false);
      else if (operation === 'parameter') this.push(this.nominals[left[id]], this.varies(left[id]));
      else {
        const second = isBinary(operation) ? right[id] : left[id];
        const step: Program = {
          operations: ['constant', 'constant', operation],
          left: [0, 0, 0],
          right: [0, 0, 1],
          constants: [this.values[left[id]], this.values[second], 0],
        };
        evaluateProgram(step, [], this.single);
        this.push(this.single[2], this.varying[left[id]] || this.varying[second]);
      }
    }
  }

  private push(value: number, varying: boolean): void {
    this.values.push(value);
    this.varying.push(varying);
  }
}
