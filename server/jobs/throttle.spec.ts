import { expect, it } from 'vitest';
import { createThrottle } from './throttle';

it('createThrottle lets the first through, and then one in each span of the clock', () => {
  let now = 0;
  const isDue = createThrottle({ clock: () => now, everyMs: 100 });
  const due = [0, 1, 99, 100, 150, 199, 200, 1000, 1001].filter((time) => {
    now = time;
    return isDue();
  });
  expect(due).toEqual([0, 100, 200, 1000]);
});
