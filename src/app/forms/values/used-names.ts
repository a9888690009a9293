import type { Study } from '../../../../shared/contracts';
import { ExpressionError, parseExpression, visitNames } from '../../../../shared/expressions';

/** Names in the expressions of a study, its machine left out. Texts that are no expressions count for nothing. */
export function usedNames(study: Study): ReadonlySet<string> {
  const names = new Set<string>();
  const { parameters, definitions, control, actuator, sensor, sampling, rating, requirements } = study;
  const numbers = parameters.map(({ nominal, low, high, minimum, maximum }) => [
    nominal,
    low,
    high,
    minimum,
    maximum,
  ]);
  visit([numbers, definitions, control, actuator, sensor, sampling, rating, requirements]);
  return names;

  function visit(value: unknown): void {
    if (typeof value === 'string') {
      try {
        visitNames(parseExpression(value), (name) => names.add(name));
      } catch (error) {
        if (!(error instanceof ExpressionError)) throw error;
      }
    } else if (typeof value === 'object' && value !== null) Object.values(value).forEach(visit);
  }
}
