import { ExactEvaluator, exponentOf, type ExactPolynomial, type Program } from '../../../expressions';
import type { LoopMatrix } from '../../loop/loop-matrix';
import { expandLoop, type LoopPolynomial } from '../../polynomial/loop-polynomial';
import type { RequiredSign, Subject } from './sign-condition';

/**
 * A polynomial with the sign that is asked for: the quantity itself, or, where only zeros matter, its numerator.
 * undefined where a parameter enters otherwise than rationally.
 *
 * @throws ExpansionLimitError beyond a stated limit, RangeError at a division by the constant 0
 */
export function exactSubject(
  program: Program,
  subject: Subject,
  required: RequiredSign,
  nominals: readonly number[],
  variables: readonly number[],
): LoopPolynomial | undefined {
  const evaluator = new ExactEvaluator(program, nominals, variables);
  switch (subject.kind) {
    case 'node': {
      const value = evaluator.node(subject.node);
      if (value === undefined || (required !== 'nonzero' && value.denominator.size > 0)) return undefined;
      return withoutFrequency(value.numerator);
    }
    case 'cosine':
      return undefined;
    case 'determinant':
      return expandLoop(determinantMatrix(program, subject.rows), evaluator, -1);
  }
}

function withoutFrequency({ packing, exponent, terms }: ExactPolynomial): LoopPolynomial {
  const { variables, bits } = packing;
  return {
    variables,
    exponent,
    broken: [...terms].map(([key, coefficient]) => ({
      power: 0,
      exponents: Array.from({ length: variables }, (_, variable) => exponentOf(key, variable, bits)),
      coefficient,
    })),
    returned: [],
    divisors: [],
  };
}

/** A matrix of nodes as a loop without states. Clearing denominators row by row keeps the zeros of its determinant. */
function determinantMatrix(program: Program, rows: readonly (readonly number[])[]): LoopMatrix {
  return {
    program,
    size: rows.length,
    entries: rows.flatMap((nodes, row) =>
      nodes.map((node, column) => ({ row, column, power: 0, node, law: -1 })),
    ),
    columnDegrees: rows.map(() => 0),
    order: 0,
    lawInputs: [],
    delays: [],
  };
}
