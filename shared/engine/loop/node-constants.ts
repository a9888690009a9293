import { dependentNodes, evaluateProgram, type NodeId, type Program } from '../../expressions';

/**
 * Tells which nodes of a program are constant while some parameters vary, and their values. The program may grow
 * meanwhile: assembling a loop appends products to it.
 */
export class NodeConstants {
  private dependent: readonly boolean[] = [];
  private values = new Float64Array(0);

  /**
   * @param parameters values of all parameters (SI)
   * @param varying indices of those that vary
   */
  constructor(
    private readonly program: Program,
    private readonly parameters: ArrayLike<number>,
    private readonly varying: readonly number[],
  ) {}

  /** The value of a node, undefined for one that varies. */
  valueOf(node: NodeId): number | undefined {
    if (node >= this.values.length) this.evaluate();
    return this.dependent[node] ? undefined : this.values[node];
  }

  private evaluate(): void {
    this.dependent = dependentNodes(this.program, (parameter) => this.varying.includes(parameter));
    this.values = new Float64Array(this.program.operations.length);
    evaluateProgram(this.program, this.parameters, this.values);
  }
}
