import { lawsOf, type Law } from './control';
import { lawPath } from './declared-names';
import type { Fault } from './fault';
import { isSecondOrder, isTemplateMachine, type CustomMachine } from './machine';
import { formatPath, type PathPart } from './path';
import type { Matrix, Scalar, Vector } from './scalar';
import type { Study } from './study';

type Report = (path: readonly PathPart[], message: string) => void;

/** Faults of sizes in a study: its machine (where it is written out) and its laws. */
export function checkSizes(study: Study): Fault[] {
  const faults: Fault[] = [];
  const report: Report = (path, message) => faults.push({ path: formatPath(path), message });
  if (!isTemplateMachine(study.machine)) checkMachine(study.machine, report);
  lawsOf(study.control).forEach((law, index) => checkLaw(law, lawPath(study, index), report));
  if (Array.isArray(study.actuator)) {
    const laws = lawsOf(study.control).length;
    if (study.actuator.length !== laws)
      report(['actuator'], countMessage(study.actuator.length, laws, 'law'));
  }
  return faults;
}

function checkMachine(machine: CustomMachine, report: Report): void {
  const path = (...parts: PathPart[]) => ['machine', ...parts];
  const second = isSecondOrder(machine);
  const what = second ? 'coordinate' : 'state';
  const size = second ? machine.coordinates.length : machine.states.length;
  if (second) {
    for (const key of ['mass', 'damping', 'stiffness'] as const) {
      checkSquare(machine[key], size, what, path(key), report);
    }
    for (const [name, output] of Object.entries(machine.outputs ?? {})) {
      for (const part of ['position', 'velocity'] as const) {
        checkVector(output[part], size, what, path('outputs', name, part), report);
      }
    }
  } else {
    if (machine.descriptor !== undefined)
      checkSquare(machine.descriptor, size, what, path('descriptor'), report);
    checkSquare(machine.dynamics, size, what, path('dynamics'), report);
    for (const [name, output] of Object.entries(machine.outputs ?? {})) {
      checkVector(output, size, what, path('outputs', name), report);
    }
  }
  for (const key of ['inputs', 'disturbances'] as const) {
    for (const [name, column] of Object.entries(machine[key] ?? {})) {
      checkVector(column, size, what, path(key, name), report);
    }
  }
}

function checkLaw(law: Law, path: readonly PathPart[], report: Report): void {
  if (law.law === 'state-space') {
    const size = law.A.length;
    checkSquare(law.A, size, 'state of the law', [...path, 'A'], report);
    checkVector(law.B, size, 'state of the law', [...path, 'B'], report);
    checkVector(law.C, size, 'state of the law', [...path, 'C'], report);
  }
  if (law.law === 'transfer-function') {
    const denominatorDegree = degree(law.denominator);
    if (denominatorDegree < 0) report([...path, 'denominator'], 'must not be zero');
    else if (degree(law.numerator) > denominatorDegree) {
      report([...path, 'numerator'], 'must not be of higher degree than the denominator');
    }
  }
}

function checkSquare(
  matrix: Matrix,
  size: number,
  what: string,
  path: readonly PathPart[],
  report: Report,
): void {
  if (matrix.length !== size) {
    report(path, `must have ${plural(size, 'row')}, one per ${what}, not ${matrix.length}`);
  }
  matrix.forEach((row, index) => checkVector(row, size, what, [...path, index], report));
}

function checkVector(
  vector: Vector | undefined,
  size: number,
  what: string,
  path: readonly PathPart[],
  report: Report,
): void {
  if (vector !== undefined && vector.length !== size) report(path, countMessage(vector.length, size, what));
}

function countMessage(found: number, size: number, what: string): string {
  return `must have ${plural(size, 'entry')}, one per ${what}, not ${found}`;
}

function plural(count: number, noun: 'row' | 'entry'): string {
  if (count === 1) return `1 ${noun}`;
  return `${count} ${noun === 'row' ? 'rows' : 'entries'}`;
}

/** Degree of a polynomial in descending powers, leading zeros that are written as such left aside; −1 for zero. */
function degree(coefficients: readonly Scalar[]): number {
  const leading = coefficients.findIndex((coefficient) => Number(coefficient) !== 0);
  return leading < 0 ? -1 : coefficients.length - 1 - leading;
}
