import type { ComposedLoop } from '../loop/composed';
import { buildLoop, type ConstantValue } from '../loop/build-loop';
import type { FaultList } from './fault-list';

/** Most states of a closed loop, control and hardware included. */
export const MOST_STATES = 24;

/** Most columns of the loop's polynomial matrix: sets of columns are kept as bits of one integer. */
export const MOST_COLUMNS = 31;

/** Adds a fault for a loop that is too large to be expanded. */
export function checkLoopSize(loop: ComposedLoop, constantValue: ConstantValue, faults: FaultList): void {
  const written = writtenStates(loop);
  if (written > MOST_STATES) {
    faults.add(
      ['machine'],
      `is too large: ${written} states or more; at most ${MOST_STATES}, control and hardware included`,
    );
    return;
  }
  const { order, size } = buildLoop(loop, constantValue);
  if (order > MOST_STATES) {
    faults.add(
      ['machine'],
      `is too large: ${order} states with control and hardware; at most ${MOST_STATES}`,
    );
  } else if (size > MOST_COLUMNS) {
    faults.add(
      ['machine'],
      `is too large: ${size} signals with control and hardware; at most ${MOST_COLUMNS}`,
    );
  }
}

/** States of machine and laws as they are written, so that a huge one is refused before it is assembled. */
function writtenStates({ machine, laws }: ComposedLoop): number {
  let states = machine.order * machine.names.length;
  for (const law of laws) {
    if (law.law === 'state-space') states += law.a.length;
    if (law.law === 'transfer-function') states += Math.max(law.denominator.length - 1, 0);
  }
  return states;
}
