import { evaluateProgram } from './evaluate';
import { ExactPolynomial, type ExponentPacking, exponentPacking } from './exact-polynomial';
import { dependentNodes, type NodeId, type Program } from './program';
import { RationalFunction } from './rational-function';

/** Largest integer exponent that is multiplied out. */
const LARGEST_POWER = 32;

/**
 * The nodes of a program as exact rational functions of chosen parameters (the variables); all other parameters are
 * constants with their exact double values. Sums, products and quotients of constants stay exact; a function such as
 * sqrt of a constant is the double that `evaluateProgram` gives.
 */
export class ExactEvaluator {
  readonly packing: ExponentPacking;
  private readonly cache = new Map<NodeId, RationalFunction | undefined>();
  private readonly variableOf = new Map<number, number>();
  private readonly dependent: readonly boolean[];
  private readonly values: Float64Array;

  /**
   * @param parameters values of all parameters (SI); those of the variables are not used
   * @param variables parameter indices, in the order of the exponent vectors
   */
  constructor(
    private readonly program: Program,
    parameters: ArrayLike<number>,
    variables: readonly number[],
  ) {
    this.packing = exponentPacking(variables.length);
    variables.forEach((parameter, variable) => this.variableOf.set(parameter, variable));
    this.dependent = dependentNodes(program, (parameter) => this.variableOf.has(parameter));
    this.values = new Float64Array(program.operations.length);
    evaluateProgram(program, parameters, this.values);
  }

  /**
   * The node as a rational function, or undefined where a variable enters otherwise than rationally.
   * @throws ExpansionLimitError when an expansion passes a stated limit, RangeError at a division by the constant 0
   */
  node(id: NodeId): RationalFunction | undefined {
    if (this.cache.has(id)) return this.cache.get(id);
    const result = this.compute(id);
    this.cache.set(id, result);
    return result;
  }

  private compute(id: NodeId): RationalFunction | undefined {
    const { operations, left, right, constants } = this.program;
    const operation = operations[id];
    const a = left[id];
    const b = right[id];
    switch (operation) {
      case 'constant':
        return RationalFunction.constant(this.packing, constants[id]);
      case 'parameter': {
        const variable = this.variableOf.get(a);
        if (variable === undefined) return RationalFunction.constant(this.packing, this.values[id]);
        return new RationalFunction(ExactPolynomial.variable(this.packing, variable));
      }
      case 'add':
        return combine(this.node(a), this.node(b), (x, y) => x.add(y));
      case 'subtract':
        return combine(this.node(a), this.node(b), (x, y) => x.add(y.negate()));
      case 'multiply':
        return combine(this.node(a), this.node(b), (x, y) => x.multiply(y));
      case 'divide':
        return combine(this.node(a), this.node(b), (x, y) => x.multiply(y.reciprocal()));
      case 'negate':
        return this.node(a)?.negate();
      case 'power':
        return this.power(id, a, b);
      default:
        return this.dependent[id] ? undefined : RationalFunction.constant(this.packing, this.values[id]);
    }
  }

  private power(id: NodeId, base: NodeId, exponent: NodeId): RationalFunction | undefined {
    const value = this.values[exponent];
    const whole =
      !this.dependent[exponent] && Math.floor(value) === value && Math.abs(value) <= LARGEST_POWER;
    if (whole) return this.node(base)?.power(value);
    return this.dependent[id] ? undefined : RationalFunction.constant(this.packing, this.values[id]);
  }
}

function combine(
  a: RationalFunction | undefined,
  b: RationalFunction | undefined,
  operation: (a: RationalFunction, b: RationalFunction) => RationalFunction,
): RationalFunction | undefined {
  return a === undefined || b === undefined ? undefined : operation(a, b);
}
