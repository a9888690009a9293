import {
  isSecondOrder,
  isTemplateMachine,
  type CustomMachine,
  type PathPart,
  type Study,
} from '../../contracts';
import type { NodeId } from '../../expressions';
import type { ComposedMachine, ComposedOutput } from '../loop/composed';
import type { ExpressionCompiler } from './expression-compiler';

/**
 * The machine with its entries as nodes: coefficients [K, D, M], or [−A, E] with the identity for a descriptor that is
 * left out. The entries of a template stand in no file, so their faults are told at `machine`.
 */
export function composeMachine(
  study: Study,
  machine: CustomMachine,
  compiler: ExpressionCompiler,
): ComposedMachine {
  const { program } = compiler;
  const isTemplate = isTemplateMachine(study.machine);
  const at = (...parts: PathPart[]): PathPart[] => ['machine', ...parts];
  const scalars = (vector: readonly (string | number)[], path: readonly PathPart[]): NodeId[] =>
    vector.map((entry, index) => compiler.scalar(entry, isTemplate ? at() : [...path, index]));
  const rows = (matrix: readonly (readonly (string | number)[])[], path: readonly PathPart[]): NodeId[][] =>
    matrix.map((row, index) => scalars(row, [...path, index]));
  const columns = (key: 'inputs' | 'disturbances'): Map<string, NodeId[]> =>
    new Map(
      Object.entries(machine[key] ?? {}).map(([name, column]) => [name, scalars(column, at(key, name))]),
    );

  if (isSecondOrder(machine)) {
    const size = machine.coordinates.length;
    const none = new Array<NodeId>(size).fill(program.zero);
    return {
      order: 2,
      names: machine.coordinates,
      coefficients: [
        rows(machine.stiffness, at('stiffness')),
        rows(machine.damping, at('damping')),
        rows(machine.mass, at('mass')),
      ],
      inputs: columns('inputs'),
      disturbances: columns('disturbances'),
      outputs: new Map(
        Object.entries(machine.outputs ?? {}).map(
          ([name, { position, velocity }]): [string, ComposedOutput] => [
            name,
            {
              position: position === undefined ? none : scalars(position, at('outputs', name, 'position')),
              velocity: velocity === undefined ? none : scalars(velocity, at('outputs', name, 'velocity')),
            },
          ],
        ),
      ),
    };
  }
  const dynamics = rows(machine.dynamics, at('dynamics'));
  return {
    order: 1,
    names: machine.states,
    coefficients: [
      dynamics.map((row) => row.map((node) => program.negate(node))),
      machine.descriptor === undefined
        ? machine.states.map((_, i) => machine.states.map((_, j) => (i === j ? program.one : program.zero)))
        : rows(machine.descriptor, at('descriptor')),
    ],
    inputs: columns('inputs'),
    disturbances: columns('disturbances'),
    outputs: new Map(
      Object.entries(machine.outputs ?? {}).map(([name, output]): [string, ComposedOutput] => [
        name,
        {
          position: scalars(output, at('outputs', name)),
          velocity: machine.states.map(() => program.zero),
        },
      ]),
    ),
  };
}
