import type { PathPart } from '../../../contracts';
import type { NodeId, Program } from '../../../expressions';
import { DOMAIN_REASONS } from '../evaluate-constant';
import type { NodeSite } from '../expression-compiler';
import type { NominalValues } from '../../loop/nominal-values';
import type { RequiredSign, SignCondition, Subject } from './sign-condition';

/**
 * What must hold for an operation of a study's expression to be defined: divisors, roots, logarithms, powers, tan.
 *
 * @param mayBeNegative whether a node cannot be shown to be at least 0 everywhere in the bands
 */
export function operationConditions(
  program: Program,
  { node, path }: NodeSite,
  nominal: NominalValues,
  mayBeNegative: (node: NodeId) => boolean,
): SignCondition[] {
  const { operations, left, right } = program;
  const operand: Subject = { kind: 'node', node: left[node] };
  switch (operations[node]) {
    case 'divide':
      return [condition(path, { kind: 'node', node: right[node] }, 'nonzero', DOMAIN_REASONS.division)];
    case 'sqrt':
      return [condition(path, operand, 'nonnegative', DOMAIN_REASONS.root)];
    case 'log':
      return [condition(path, operand, 'positive', DOMAIN_REASONS.logarithm)];
    case 'tan':
      return [condition(path, { kind: 'cosine', node: left[node] }, 'nonzero', DOMAIN_REASONS.tangent)];
    case 'power':
      return powerConditions(path, operand, right[node], nominal, mayBeNegative);
    default:
      return [];
  }
}

function powerConditions(
  path: readonly PathPart[],
  base: Subject,
  exponent: NodeId,
  nominal: NominalValues,
  mayBeNegative: (node: NodeId) => boolean,
): SignCondition[] {
  if (nominal.isVarying(exponent)) {
    const conditions = [condition(path, base, 'nonnegative', DOMAIN_REASONS.power)];
    if (mayBeNegative(exponent))
      conditions.push(condition(path, base, 'nonzero', DOMAIN_REASONS.powerOfZero));
    return conditions;
  }
  const value = nominal.value(exponent);
  const conditions: SignCondition[] = [];
  if (!Number.isInteger(value)) conditions.push(condition(path, base, 'nonnegative', DOMAIN_REASONS.power));
  if (value < 0) conditions.push(condition(path, base, 'nonzero', DOMAIN_REASONS.division));
  return conditions;
}

function condition(
  path: readonly PathPart[],
  subject: Subject,
  sign: RequiredSign,
  reason: string,
): SignCondition {
  return { path, subject, sign, message: (point) => `${reason}${point}` };
}
