import type { Drawing } from './drawing';

export const twoMassDriveDrawing: Drawing = {
  width: 240,
  height: 116,
  description:
    'The force u pushes the drive M; spring k and damper c link it to the carriage m₀, which carries the payload m.',
  items: [
    { kind: 'force', from: [4, 66], to: [32, 66], symbol: 'u', at: [14, 53] },
    { kind: 'block', corner: [36, 40], size: [50, 52], symbol: 'M' },
    { kind: 'spring', from: [86, 49], to: [156, 49], symbol: 'k', at: [121, 33] },
    { kind: 'damper', from: [86, 81], to: [156, 81], symbol: 'c', at: [121, 65] },
    { kind: 'block', corner: [156, 40], size: [50, 52], symbol: 'm₀' },
    { kind: 'block', corner: [161, 12], size: [40, 28], symbol: 'm', payload: true },
    {
      kind: 'line',
      points: [
        [2, 92],
        [238, 92],
      ],
    },
    { kind: 'damper', from: [61, 92], to: [61, 114], symbol: 'b', at: [80, 104] },
    { kind: 'ground', from: [50, 114], to: [72, 114] },
    { kind: 'motion', from: [61, 18], to: [84, 18], symbol: 'q_1', at: [95, 18] },
    { kind: 'motion', from: [208, 18], to: [224, 18], symbol: 'q_2', at: [233, 18] },
  ],
};
