import type { Drawing } from './drawing';

export const massSpringDamperDrawing: Drawing = {
  width: 240,
  height: 116,
  description:
    'The carrying part m₀ with the payload m on it stands between spring k and damper c at a wall; the force u pushes it along q.',
  items: [
    { kind: 'ground', from: [34, 104], to: [34, 40] },
    { kind: 'spring', from: [34, 58], to: [126, 58], symbol: 'k', at: [80, 44] },
    { kind: 'damper', from: [34, 86], to: [126, 86], symbol: 'c', at: [80, 105] },
    { kind: 'block', corner: [126, 46], size: [54, 52], symbol: 'm₀' },
    { kind: 'block', corner: [133, 18], size: [40, 28], symbol: 'm', payload: true },
    {
      kind: 'line',
      points: [
        [112, 98],
        [236, 98],
      ],
    },
    { kind: 'force', from: [222, 72], to: [184, 72], symbol: 'u', at: [214, 60] },
    { kind: 'motion', from: [193, 24], to: [222, 24], symbol: 'q', at: [231, 24] },
  ],
};
