import { isBinary, type NodeId, type Program } from '../../../expressions';
import {
  abs,
  add,
  cos,
  divide,
  exp,
  isDomainIssue,
  log,
  multiply,
  negate,
  pointInterval,
  pow,
  sin,
  sqrt,
  subtract,
  tan,
  type DomainIssue,
  type Interval,
} from '../../../expressions/interval';

/** What is known of a value that may not exist. */
export const ANY: Interval = { low: -Infinity, high: Infinity };

/** The nodes that some nodes are computed from, themselves included, in the order of evaluation. */
export function coneOf(program: Program, roots: readonly NodeId[]): NodeId[] {
  const marked = new Set(roots);
  const cone: NodeId[] = [];
  let top = -1;
  for (const root of roots) top = Math.max(top, root);
  for (let id = top; id >= 0; id--) {
    if (!marked.has(id)) continue;
    cone.push(id);
    const operation = program.operations[id];
    if (operation === 'constant' || operation === 'parameter') continue;
    marked.add(program.left[id]);
    if (isBinary(operation)) marked.add(program.right[id]);
  }
  return cone.reverse();
}

/**
 * Encloses the nodes of a cone over a box; a value that does not exist everywhere in the box is enclosed by ANY.
 *
 * @param parameters the range of each parameter, SI
 * @param values receives one interval per node of the cone, at the node's index
 */
export function encloseNodes(
  program: Program,
  cone: readonly NodeId[],
  parameters: readonly Interval[],
  values: Interval[],
): void {
  for (const id of cone) {
    const result = enclose(program, id, parameters, values);
    values[id] = isDomainIssue(result) ? ANY : result;
  }
}

function enclose(
  { operations, left, right, constants }: Program,
  id: NodeId,
  parameters: readonly Interval[],
  values: readonly Interval[],
): Interval | DomainIssue {
  const a = values[left[id]];
  const b = values[right[id]];
  switch (operations[id]) {
    case 'constant':
      return pointInterval(constants[id]);
    case 'parameter':
      return parameters[left[id]];
    case 'add':
      return add(a, b);
    case 'subtract':
      return subtract(a, b);
    case 'multiply':
      return multiply(a, b);
    case 'divide':
      return divide(a, b);
    case 'negate':
      return negate(a);
    case 'power':
      return pow(a, b);
    case 'sqrt':
      return sqrt(a);
    case 'sin':
      return sin(a);
    case 'cos':
      return cos(a);
    case 'tan':
      return tan(a);
    case 'exp':
      return exp(a);
    case 'log':
      return log(a);
    case 'abs':
      return abs(a);
  }
}
