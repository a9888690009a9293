import { quoted, type PathPart, type Scalar } from '../../contracts';
import { visitNames, type Expression } from '../../expressions';
import { evaluateConstant } from './evaluate-constant';
import type { FaultList } from './fault-list';
import { atColumn, parseScalar } from './parse-scalar';

/** What a name stands for where only exact values count: its SI value, or why it has none. */
export type NameState = number | 'toleranced' | 'failed';

/**
 * Numbers of parameters, searches, ratings, requirement levels and map ranges: expressions in exact parameters and in
 * definitions made of them.
 */
export class ExactValues {
  private readonly states = new Map<string, NameState>();

  constructor(private readonly faults: FaultList) {}

  set(name: string, state: NameState): void {
    this.states.set(name, state);
  }

  /** The value of a number in the study; undefined, with a fault, where it has none. */
  number(scalar: Scalar, path: readonly PathPart[]): number | undefined {
    const tree = parseScalar(scalar, path, this.faults);
    return tree === undefined ? undefined : this.value(tree, path);
  }

  /** `number` for an expression that is parsed already. */
  value(tree: Expression, path: readonly PathPart[]): number | undefined {
    let usable = true;
    visitNames(tree, (name, position) => {
      const state = this.states.get(name);
      if (typeof state === 'number') return;
      usable = false;
      // What failed has its own fault.
      if (state === 'failed') return;
      const message =
        state === undefined
          ? `unknown parameter or definition ${quoted(name)}`
          : `${quoted(name)} has a band or depends on one; only exact parameters may be used here`;
      this.faults.add(path, atColumn(message, position));
    });
    return usable ? this.evaluate(tree, path) : undefined;
  }

  /** The state of a definition with this expression. */
  definitionState(tree: Expression, path: readonly PathPart[]): NameState {
    let state: NameState = 0;
    visitNames(tree, (name) => {
      const own = this.states.get(name) ?? 'failed';
      if (own === 'failed' || (own === 'toleranced' && state !== 'failed')) state = own;
    });
    if (state !== 0) return state;
    return this.evaluate(tree, path) ?? 'failed';
  }

  private evaluate(tree: Expression, path: readonly PathPart[]): number | undefined {
    const result = evaluateConstant(tree, (name) => {
      const state = this.states.get(name);
      return typeof state === 'number' ? state : NaN;
    });
    if ('value' in result) return result.value;
    this.faults.add(path, result.reason);
    return undefined;
  }
}
