import type { Scalar } from '../../../../../shared/contracts';
import { evaluateProgram, parseExpression, ProgramBuilder } from '../../../../../shared/expressions';

/** The value of a number, or of an expression without names; undefined for what only the engine can evaluate. */
export function constantNumber(scalar: Scalar | undefined): number | undefined {
  if (scalar === undefined) return undefined;
  if (typeof scalar === 'number') return finite(scalar);
  try {
    const program = new ProgramBuilder();
    const root = program.expression(parseExpression(scalar), () => program.constant(NaN));
    const values = new Float64Array(program.operations.length);
    evaluateProgram(program, [], values);
    return finite(values[root]);
  } catch {
    return undefined;
  }
}

function finite(value: number): number | undefined {
  return Number.isFinite(value) ? value : undefined;
}
