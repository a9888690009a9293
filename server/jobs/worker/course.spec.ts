import { describe, expect, it } from 'vitest';
import { RunControl } from '../run-control';
import { driveCourse, Stopped } from './course';

function* counting(steps: number, onStep: (step: number) => void = () => {}): Generator<void, string> {
  for (let step = 1; step <= steps; step++) {
    onStep(step);
    yield;
  }
  return 'end';
}

describe('driveCourse', () => {
  it('drives to the end and tells the share to the other side', () => {
    const control = new RunControl();
    const otherSide = new RunControl(control.buffer);
    const shares: number[] = [];
    const course = counting(4, () => shares.push(otherSide.share));
    expect(driveCourse(course, control, (steps) => steps / 4)).toBe('end');
    expect(shares).toEqual([0, 0.25, 0.5, 0.75]);
    expect(otherSide.share).toBe(1);
  });

  it('stops after the step in which the other side asked for it', () => {
    const control = new RunControl();
    let last = 0;
    const course = counting(100, (step) => {
      last = step;
      if (step === 7) new RunControl(control.buffer).askToStop();
    });
    expect(() => driveCourse(course, control, () => 0)).toThrow(Stopped);
    expect(last).toBe(7);
  });

  it('keeps shares within 0 and 1', () => {
    const control = new RunControl();
    driveCourse(counting(1), control, () => 3);
    expect(control.share).toBe(1);
    driveCourse(counting(1), control, () => -3);
    expect(control.share).toBe(0);
  });
});
