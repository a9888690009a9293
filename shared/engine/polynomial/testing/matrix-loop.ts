import { parseExpression, ProgramBuilder } from '../../../expressions';
import type { LoopEntry, LoopMatrix } from '../../loop/loop-matrix';

/** [row, column, power of s, expression in p0, p1, …, index of the law it returns through]. */
export type WrittenEntry = readonly [
  row: number,
  column: number,
  power: number,
  expression: string,
  law?: number,
];

/** A polynomial matrix written out entry by entry. */
export function matrixLoop(size: number, written: readonly WrittenEntry[]): LoopMatrix {
  const program = new ProgramBuilder();
  const entries: LoopEntry[] = written.map(([row, column, power, expression, law = -1]) => ({
    row,
    column,
    power,
    node: program.expression(parseExpression(expression), (name) => program.parameter(Number(name.slice(1)))),
    law,
  }));
  const columnDegrees = Array.from({ length: size }, (_, j) =>
    entries.reduce((degree, { column, power }) => (column === j ? Math.max(degree, power) : degree), 0),
  );
  return {
    program,
    size,
    entries,
    columnDegrees,
    order: columnDegrees.reduce((sum, degree) => sum + degree, 0),
    lawInputs: [],
    delays: [],
  };
}
