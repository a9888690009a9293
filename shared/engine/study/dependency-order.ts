export interface DependencyOrder {
  /** Every name, after all names it depends on, those of a cycle aside. */
  readonly order: readonly string[];
  /** Names that depend on themselves, each cycle from one of its names on; the last depends on the first. */
  readonly cycles: readonly (readonly string[])[];
}

/**
 * Orders names so that each follows those it depends on (depth-first search; Tarjan 1976, Acta Informatica 6:171–185).
 * Without recursion, since a file may chain many thousands of definitions.
 */
export function dependencyOrder(
  names: Iterable<string>,
  dependenciesOf: (name: string) => readonly string[],
): DependencyOrder {
  const order: string[] = [];
  const cycles: string[][] = [];
  const state = new Map<string, 'open' | 'done'>();
  const stack: { readonly name: string; readonly dependencies: readonly string[]; next: number }[] = [];
  const open = (name: string) => {
    state.set(name, 'open');
    stack.push({ name, dependencies: dependenciesOf(name), next: 0 });
  };
  for (const start of names) {
    if (state.has(start)) continue;
    open(start);
    while (stack.length > 0) {
      const top = stack[stack.length - 1];
      if (top.next === top.dependencies.length) {
        state.set(top.name, 'done');
        order.push(top.name);
        stack.pop();
        continue;
      }
      const dependency = top.dependencies[top.next++];
      const seen = state.get(dependency);
      if (seen === undefined) open(dependency);
      else if (seen === 'open') {
        const from = stack.findIndex(({ name }) => name === dependency);
        cycles.push(stack.slice(from).map(({ name }) => name));
      }
    }
  }
  return { order, cycles };
}
