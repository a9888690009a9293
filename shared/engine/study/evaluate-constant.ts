import {
  evaluateProgram,
  isBinary,
  ProgramBuilder,
  type Expression,
  type NodeId,
  type Operation,
  type Program,
} from '../../expressions';

export type Evaluated = { readonly value: number } | { readonly reason: string };

/** The value of an expression in which every name has a value, or why it has none. */
export function evaluateConstant(tree: Expression, valueOf: (name: string) => number): Evaluated {
  if (tree.kind === 'number') return { value: tree.value };
  const program = new ProgramBuilder();
  const root = program.expression(tree, (name) => program.constant(valueOf(name)));
  const values = new Float64Array(program.operations.length);
  evaluateProgram(program, [], values);
  const reason = firstReason(program, values);
  return reason === undefined ? { value: values[root] } : { reason };
}

function firstReason(program: Program, values: Float64Array): string | undefined {
  for (let id: NodeId = 0; id < values.length; id++) {
    if (Number.isFinite(values[id])) continue;
    return reasonOf(program.operations[id], values[program.left[id]], operandValue(program, values, id));
  }
  return undefined;
}

function operandValue(program: Program, values: Float64Array, id: NodeId): number {
  return isBinary(program.operations[id]) ? values[program.right[id]] : 0;
}

/** Why an operation on finite operands gives no finite number. */
function reasonOf(operation: Operation, left: number, right: number): string {
  if (operation === 'divide' && right === 0) return DOMAIN_REASONS.division;
  if (operation === 'sqrt') return DOMAIN_REASONS.root;
  if (operation === 'log') return DOMAIN_REASONS.logarithm;
  if (operation === 'power' && left < 0 && !Number.isInteger(right)) return DOMAIN_REASONS.power;
  if (operation === 'power' && left === 0 && right < 0) return DOMAIN_REASONS.division;
  return 'is too large for a number';
}

/** What is said of an operation outside its domain, before the point. */
export const DOMAIN_REASONS = {
  division: 'division by zero',
  root: 'root of a negative number',
  logarithm: 'logarithm of a number that is not above 0',
  power: 'power of a negative number with an exponent that is not whole',
  powerOfZero: 'power of 0 with an exponent that may be negative',
  tangent: 'pole of tan',
} as const;
