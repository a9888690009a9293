import type { BinaryOperator, Expression, FunctionName } from './expression';

/** Index of a node in a program's flat arrays. */
export type NodeId = number;

export const OPERATIONS = [
  'constant',
  'parameter',
  'add',
  'subtract',
  'multiply',
  'divide',
  'negate',
  'power',
  'sqrt',
  'sin',
  'cos',
  'tan',
  'exp',
  'log',
  'abs',
] as const;
export type Operation = (typeof OPERATIONS)[number];

/**
 * A directed acyclic graph of operations in topological order: operands always precede their node, so that one pass
 * from the first node to the last evaluates all of them. It runs in three arithmetics: plain numbers
 * (`evaluate.ts`), intervals (`evaluate-interval.ts`) and exact rational functions (`evaluate-exact.ts`).
 */
export interface Program {
  readonly operations: readonly Operation[];
  /** First operand of each node; for `parameter` the parameter's index. */
  readonly left: readonly number[];
  readonly right: readonly NodeId[];
  /** The value of each `constant` node. */
  readonly constants: readonly number[];
}

const BINARY: Readonly<Record<BinaryOperator, Operation>> = {
  '+': 'add',
  '-': 'subtract',
  '*': 'multiply',
  '/': 'divide',
  '^': 'power',
};

/** Builds a program; equal nodes are made once, so that shared definitions are evaluated once. */
export class ProgramBuilder implements Program {
  readonly operations: Operation[] = [];
  readonly left: number[] = [];
  readonly right: number[] = [];
  readonly constants: number[] = [];
  private readonly known = new Map<string, NodeId>();

  readonly zero = this.constant(0);
  readonly one = this.constant(1);

  constant(value: number): NodeId {
    // −0 and 0 are one node: no sign of zero can reach a coefficient.
    return this.node('constant', 0, 0, value === 0 ? 0 : value);
  }

  parameter(index: number): NodeId {
    return this.node('parameter', index, 0, 0);
  }

  add(a: NodeId, b: NodeId): NodeId {
    if (a === this.zero) return b;
    if (b === this.zero) return a;
    return this.node('add', a, b, 0);
  }

  subtract(a: NodeId, b: NodeId): NodeId {
    if (b === this.zero) return a;
    if (a === this.zero) return this.negate(b);
    return this.node('subtract', a, b, 0);
  }

  negate(a: NodeId): NodeId {
    if (this.operations[a] === 'constant') return this.constant(-this.constants[a]);
    if (this.operations[a] === 'negate') return this.left[a];
    return this.node('negate', a, 0, 0);
  }

  multiply(a: NodeId, b: NodeId): NodeId {
    if (a === this.zero || b === this.zero) return this.zero;
    if (a === this.one) return b;
    if (b === this.one) return a;
    return this.node('multiply', a, b, 0);
  }

  divide(a: NodeId, b: NodeId): NodeId {
    if (b === this.one) return a;
    return this.node('divide', a, b, 0);
  }

  power(a: NodeId, b: NodeId): NodeId {
    if (b === this.one) return a;
    return this.node('power', a, b, 0);
  }

  call(name: FunctionName, argument: NodeId): NodeId {
    return this.node(name, argument, 0, 0);
  }

  /**
   * Appends an expression; `resolve` gives the node of each name (a parameter or a definition) and may throw.
   */
  expression(tree: Expression, resolve: (name: string, position: number) => NodeId): NodeId {
    switch (tree.kind) {
      case 'number':
        return this.constant(tree.value);
      case 'name':
        return resolve(tree.name, tree.position);
      case 'negate':
        return this.negate(this.expression(tree.operand, resolve));
      case 'call':
        return this.call(tree.name, this.expression(tree.argument, resolve));
      case 'binary': {
        const left = this.expression(tree.left, resolve);
        const right = this.expression(tree.right, resolve);
        switch (BINARY[tree.operator]) {
          case 'add':
            return this.add(left, right);
          case 'subtract':
            return this.subtract(left, right);
          case 'multiply':
            return this.multiply(left, right);
          case 'divide':
            return this.divide(left, right);
          default:
            return this.power(left, right);
        }
      }
    }
  }

  private node(operation: Operation, left: number, right: number, constant: number): NodeId {
    const key = `${operation} ${left} ${right} ${constant}`;
    const known = this.known.get(key);
    if (known !== undefined) return known;
    const id = this.operations.length;
    this.operations.push(operation);
    this.left.push(left);
    this.right.push(right);
    this.constants.push(constant);
    this.known.set(key, id);
    return id;
  }
}

/** Which nodes depend on at least one of the parameters for which `varies` is true. */
export function dependentNodes(program: Program, varies: (parameter: number) => boolean): boolean[] {
  const result: boolean[] = [];
  program.operations.forEach((operation, id) => {
    const left = program.left[id];
    if (operation === 'constant') result.push(false);
    else if (operation === 'parameter') result.push(varies(left));
    else result.push(result[left] || (isBinary(operation) && result[program.right[id]]));
  });
  return result;
}

export function isBinary(operation: Operation): boolean {
  return (
    operation === 'add' ||
    operation === 'subtract' ||
    operation === 'multiply' ||
    operation === 'divide' ||
    operation === 'power'
  );
}
