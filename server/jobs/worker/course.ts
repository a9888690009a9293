import type { RunControl } from '../run-control';

/** The computation was asked to stop. */
export class Stopped extends Error {
  override readonly name = 'Stopped';
}

/**
 * Drives a resumable computation to its end and looks after every step whether it is to stop: a step is a box, a
 * sample or a map's node, far longer than the look.
 *
 * @param shareAfter the share of the whole work that is done after so many steps
 * @throws Stopped
 */
export function driveCourse<T>(
  course: Generator<void, T>,
  control: RunControl,
  shareAfter: (steps: number) => number,
): T {
  for (let steps = 1; ; steps++) {
    const { done, value } = course.next();
    if (done === true) return value;
    if (control.isAskedToStop) throw new Stopped();
    control.share = shareAfter(steps);
  }
}
