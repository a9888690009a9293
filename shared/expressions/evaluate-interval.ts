import * as interval from './interval';
import type { DomainIssue, Interval } from './interval';
import type { Program } from './program';

/**
 * Encloses every node of a program over all parameter values in the given intervals. Where an operation may leave its
 * domain the node is an issue, and so is every node that uses it: the first operand's issue before the second's,
 * with `everywhere` as the operation found it.
 *
 * @param parameters ranges of all parameters in SI units, by parameter index
 */
export function evaluateInterval(
  program: Program,
  parameters: readonly Interval[],
): (Interval | DomainIssue)[] {
  const { operations, left, right, constants } = program;
  const values: (Interval | DomainIssue)[] = [];
  operations.forEach((operation, id) => {
    if (operation === 'constant') values.push(interval.pointInterval(constants[id]));
    else if (operation === 'parameter') values.push(parameters[left[id]]);
    else {
      const operand = values[left[id]];
      values.push(
        interval.isDomainIssue(operand) ? operand : combine(operation, operand, () => values[right[id]]),
      );
    }
  });
  return values;
}

type Operator = Exclude<Program['operations'][number], 'constant' | 'parameter'>;

function combine(
  operation: Operator,
  x: Interval,
  second: () => Interval | DomainIssue,
): Interval | DomainIssue {
  switch (operation) {
    case 'add':
    case 'subtract':
    case 'multiply':
    case 'divide': {
      const y = second();
      return interval.isDomainIssue(y) ? y : interval[operation](x, y);
    }
    case 'power': {
      const y = second();
      return interval.isDomainIssue(y) ? y : interval.pow(x, y);
    }
    default:
      return interval[operation](x);
  }
}
