import type { Drawing } from './drawing';

export const balancingCarrierDrawing: Drawing = {
  width: 240,
  height: 156,
  description:
    'The payload m with inertia J stands above the axle of the base M_b at the height h, tilted by θ; the torque u drives the wheel of radius R along x.',
  items: [
    { kind: 'ground', from: [20, 142], to: [220, 142] },
    {
      kind: 'line',
      points: [
        [110, 114],
        [110, 14],
      ],
      thin: true,
    },
    {
      kind: 'line',
      points: [
        [110, 114],
        [143, 38],
      ],
    },
    { kind: 'wheel', centre: [110, 114], radius: 28, symbol: 'R', at: [92, 124] },
    {
      kind: 'line',
      points: [
        [110, 114],
        [90, 134],
      ],
      thin: true,
    },
    { kind: 'block', corner: [122, 18], size: [44, 40], symbol: 'm', payload: true },
    { kind: 'text', symbol: 'J', at: [176, 24] },
    { kind: 'turn', from: [110, 62], over: [122, 63], to: [133, 68], symbol: 'θ', at: [121, 50] },
    {
      kind: 'turn',
      from: [142, 90],
      over: [152, 108],
      to: [146, 128],
      symbol: 'u',
      at: [163, 108],
      strong: true,
    },
    { kind: 'text', symbol: 'M_b', at: [66, 96] },
    { kind: 'distance', from: [206, 114], to: [206, 38], symbol: 'h', at: [217, 78] },
    {
      kind: 'line',
      points: [
        [168, 38],
        [210, 38],
      ],
      thin: true,
    },
    {
      kind: 'line',
      points: [
        [168, 114],
        [210, 114],
      ],
      thin: true,
    },
    { kind: 'motion', from: [24, 114], to: [52, 114], symbol: 'x', at: [36, 103] },
    { kind: 'text', symbol: 'c', at: [70, 132] },
    { kind: 'text', symbol: 'd', at: [142, 76] },
  ],
};
