import { isBinary, type NodeId, type Program } from '../../../expressions';

/** What some nodes of a program are computed from, themselves included, as a program of its own. */
export interface SubProgram {
  readonly program: Program;
  /** The new place of each node that was kept. */
  readonly placeOf: ReadonlyMap<NodeId, NodeId>;
}

export function subProgram(program: Program, roots: readonly NodeId[]): SubProgram {
  const { operations, left, right, constants } = program;
  const kept = nodesBelow(program, roots);
  const placeOf = new Map(kept.map((node, place) => [node, place]));
  const place = (node: NodeId): NodeId => placeOf.get(node) ?? 0;
  return {
    program: {
      operations: kept.map((node) => operations[node]),
      // A parameter's operand is its index, not a node.
      left: kept.map((node) => (operations[node] === 'parameter' ? left[node] : place(left[node]))),
      right: kept.map((node) => place(right[node])),
      constants: kept.map((node) => constants[node]),
    },
    placeOf,
  };
}

/** The parameters that some nodes depend on, in ascending order. */
export function parametersBelow(program: Program, roots: readonly NodeId[]): number[] {
  return nodesBelow(program, roots)
    .filter((node) => program.operations[node] === 'parameter')
    .map((node) => program.left[node])
    .sort((a, b) => a - b);
}

/** In the order of evaluation. */
function nodesBelow({ operations, left, right }: Program, roots: readonly NodeId[]): NodeId[] {
  const marked = new Set(roots);
  const nodes: NodeId[] = [];
  let top = -1;
  for (const root of roots) top = Math.max(top, root);
  for (let id = top; id >= 0; id--) {
    if (!marked.has(id)) continue;
    nodes.push(id);
    const operation = operations[id];
    if (operation === 'constant' || operation === 'parameter') continue;
    marked.add(left[id]);
    if (isBinary(operation)) marked.add(right[id]);
  }
  return nodes.reverse();
}
