import type { LoopMatrix } from '../loop/loop-matrix';
import { LoopPoles } from '../loop/loop-poles';
import { LoopMeasures } from '../measures';

/**
 * The measures of one loop at points of the search variables, in double precision: fast, and never a proof.
 * After `visit` the measures of `measures` that need the broken loop are loaded on request only.
 */
export class LoopProbe {
  readonly measures: LoopMeasures;
  readonly poles: LoopPoles;
  /** False where the loop has lost its order at the visited point, or an entry is not finite. */
  regular = false;
  private readonly parameters: Float64Array;
  private margins = false;

  /**
   * @param law index of the law whose loop the margins are read at, −1 for none
   * @param parameters values of all parameters; those of the variables are overwritten
   * @param variables parameter index of each variable
   */
  constructor(
    loop: LoopMatrix,
    private readonly law: number,
    parameters: ArrayLike<number>,
    private readonly variables: readonly number[],
  ) {
    this.poles = new LoopPoles(loop);
    this.measures = new LoopMeasures(Math.max(1, loop.order));
    this.parameters = Float64Array.from(parameters);
  }

  /** Evaluates the closed loop at a point, one value per variable. */
  visit(point: ArrayLike<number>): void {
    for (let i = 0; i < this.variables.length; i++) this.parameters[this.variables[i]] = point[i];
    this.regular = this.poles.closeLoop(this.parameters);
    this.margins = false;
    const { closedRe, closedIm, order } = this.poles;
    // Without the broken loop the measures know decay rate and damping ratio alone.
    if (this.regular) this.measures.load(closedRe, closedIm, order, closedRe, closedIm, order, 1);
  }

  /** The measures with margins, at the visited point; undefined where the broken loop has no proper form. */
  withMargins(): LoopMeasures | undefined {
    if (!this.regular) return undefined;
    if (!this.margins) {
      if (!this.poles.breakLoop(this.law)) return undefined;
      const { closedRe, closedIm, brokenRe, brokenIm, order, leadingRatio } = this.poles;
      this.measures.load(closedRe, closedIm, order, brokenRe, brokenIm, order, leadingRatio);
      this.margins = true;
    }
    return this.measures;
  }
}
