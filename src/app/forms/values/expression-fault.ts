import type { Scalar } from '../../../../shared/contracts';
import { ExpressionError, parseExpression, visitNames } from '../../../../shared/expressions';
import { isAmbiguous } from './number-text';

export interface ExpressionFault {
  readonly message: string;
  /** Offset of the character that caused it. */
  readonly position: number;
}

/** What is wrong with an expression and where; undefined for numbers and for what can be read. */
export function expressionFault(
  scalar: Scalar | undefined,
  names: ReadonlySet<string>,
): ExpressionFault | undefined {
  if (typeof scalar !== 'string' || scalar.trim() === '') return undefined;
  if (isAmbiguous(scalar)) {
    const comma = scalar.indexOf(',');
    return {
      message: `could mean ${scalar.replaceAll(',', '')} or ${scalar.replace(',', '.')}; write it without the comma`,
      position: comma,
    };
  }
  try {
    let fault: ExpressionFault | undefined;
    visitNames(parseExpression(scalar), (name, position) => {
      if (names.has(name)) return;
      fault ??= { message: `no parameter or definition is called ${name}`, position };
    });
    return fault;
  } catch (error) {
    if (!(error instanceof ExpressionError)) throw error;
    return { message: error.message, position: error.position };
  }
}
