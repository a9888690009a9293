import type { Drawing } from './drawing';

export const singleTrackDrawing: Drawing = {
  width: 240,
  height: 132,
  description:
    'The vehicle from above, driving to the right with the speed V: front axle at l_f, rear axle at l_r from the unladen centre of mass m₀, payload m at x_p behind it; δ steers the front wheel.',
  items: [
    {
      kind: 'line',
      points: [
        [34, 58],
        [204, 58],
      ],
    },
    {
      kind: 'line',
      points: [
        [20, 51],
        [48, 51],
        [48, 65],
        [20, 65],
        [20, 51],
      ],
    },
    {
      kind: 'line',
      points: [
        [194, 68],
        [191, 56],
        [214, 48],
        [217, 60],
        [194, 68],
      ],
    },
    {
      kind: 'line',
      points: [
        [204, 58],
        [236, 58],
      ],
      thin: true,
    },
    { kind: 'turn', from: [232, 58], over: [231, 53], to: [229, 49], symbol: 'δ', at: [233, 40] },
    { kind: 'block', corner: [70, 44], size: [32, 28], symbol: 'm', payload: true },
    { kind: 'centre', at: [128, 58] },
    { kind: 'text', symbol: 'm₀', at: [142, 71] },
    { kind: 'turn', from: [142, 50], over: [129, 38], to: [115, 50], symbol: 'r', at: [108, 34] },
    { kind: 'force', from: [150, 20], to: [188, 20], symbol: 'V', at: [169, 9] },
    { kind: 'motion', from: [128, 40], to: [128, 16], symbol: 'v_y', at: [143, 33] },
    { kind: 'text', symbol: 'c_r', at: [34, 39] },
    { kind: 'text', symbol: 'c_f', at: [204, 36] },
    { kind: 'distance', from: [86, 92], to: [128, 92], symbol: 'x_p', at: [107, 83] },
    { kind: 'distance', from: [34, 116], to: [128, 116], symbol: 'l_r', at: [81, 107] },
    { kind: 'distance', from: [128, 116], to: [204, 116], symbol: 'l_f', at: [166, 107] },
    {
      kind: 'line',
      points: [
        [34, 68],
        [34, 120],
      ],
      thin: true,
    },
    {
      kind: 'line',
      points: [
        [86, 74],
        [86, 96],
      ],
      thin: true,
    },
    {
      kind: 'line',
      points: [
        [128, 66],
        [128, 120],
      ],
      thin: true,
    },
    {
      kind: 'line',
      points: [
        [204, 68],
        [204, 120],
      ],
      thin: true,
    },
  ],
};
