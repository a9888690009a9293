import type { PathPart, Scalar } from '../../contracts';
import { ExpressionError, parseExpression, type Expression } from '../../expressions';
import type { FaultList } from './fault-list';

/** The syntax tree of a number or expression; undefined, with a fault, where it cannot be read. */
export function parseScalar(
  scalar: Scalar,
  path: readonly PathPart[],
  faults: FaultList,
): Expression | undefined {
  if (typeof scalar === 'number') return { kind: 'number', value: scalar };
  try {
    return parseExpression(scalar);
  } catch (error) {
    if (!(error instanceof ExpressionError)) throw error;
    faults.add(path, atColumn(error.message, error.position));
    return undefined;
  }
}

/** A message about one character of an expression; columns count from 1. */
export function atColumn(message: string, position: number): string {
  return `${message} (column ${position + 1})`;
}
