import {
  isSecondOrder,
  type CustomMachine,
  type Matrix,
  type SecondOrderOutput,
  type Vector,
} from '../../../../shared/contracts';

/** Names out of a text, separated by commas or spaces. */
export function readNames(text: string): string[] {
  return text.split(/[\s,;]+/).filter((name) => name !== '');
}

function resizedVector(vector: Vector | undefined, size: number): Vector {
  return Array.from({ length: size }, (_, index) => vector?.[index] ?? '0');
}

function resizedMatrix(matrix: Matrix, size: number, diagonal = '0'): Matrix {
  return Array.from({ length: size }, (_, row) =>
    Array.from({ length: size }, (_, column) => matrix[row]?.[column] ?? (row === column ? diagonal : '0')),
  );
}

function mapped<T>(record: Readonly<Record<string, T>> | undefined, change: (value: T) => T) {
  return Object.fromEntries(Object.entries(record ?? {}).map(([name, value]) => [name, change(value)]));
}

/** The machine with these coordinates or states; entries stay at their places, new ones are 0 (1 on a mass's diagonal). */
export function withStates(machine: CustomMachine, names: readonly string[]): CustomMachine {
  const size = names.length;
  const vector = (value: Vector) => resizedVector(value, size);
  const inputs = mapped(machine.inputs, vector);
  const disturbances = mapped(machine.disturbances, vector);
  if (isSecondOrder(machine)) {
    return {
      ...machine,
      coordinates: [...names],
      mass: resizedMatrix(machine.mass, size, '1'),
      damping: resizedMatrix(machine.damping, size),
      stiffness: resizedMatrix(machine.stiffness, size),
      inputs,
      disturbances,
      outputs: mapped(machine.outputs, ({ position, velocity }) => ({
        ...(position === undefined ? {} : { position: vector(position) }),
        ...(velocity === undefined ? {} : { velocity: vector(velocity) }),
      })),
    };
  }
  return {
    ...machine,
    states: [...names],
    ...(machine.descriptor === undefined ? {} : { descriptor: resizedMatrix(machine.descriptor, size, '1') }),
    dynamics: resizedMatrix(machine.dynamics, size),
    inputs,
    disturbances,
    outputs: mapped(machine.outputs, vector),
  };
}

/** How many coordinates or states a machine has. */
export function stateCount(machine: CustomMachine): number {
  return isSecondOrder(machine) ? machine.coordinates.length : machine.states.length;
}

/** The machine with these inputs, disturbances or outputs: the n-th keeps its vector under its new name. */
export function withSignals(
  machine: CustomMachine,
  key: 'inputs' | 'disturbances' | 'outputs',
  names: readonly string[],
): CustomMachine {
  const size = stateCount(machine);
  const old = Object.entries<Vector | SecondOrderOutput>(machine[key] ?? {});
  const kept = new Map(old);
  const isOutput = key === 'outputs' && isSecondOrder(machine);
  const fresh = (index: number) => {
    const vector = resizedVector([], size).map((zero, place) => (place === index ? '1' : zero));
    return isOutput ? { position: vector } : vector;
  };
  // A name that is new at the place of one that is gone is a renaming.
  const entries = names.map((name, index) => {
    const renamed = old[index];
    const value =
      kept.get(name) ?? (renamed !== undefined && !names.includes(renamed[0]) ? renamed[1] : fresh(index));
    return [name, value] as const;
  });
  return { ...machine, [key]: Object.fromEntries(entries) };
}
