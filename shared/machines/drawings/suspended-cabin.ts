import type { Drawing } from './drawing';

export const suspendedCabinDrawing: Drawing = {
  width: 240,
  height: 172,
  description:
    'The cabin m₀ with the payload m rests on spring k_s, damper c_s and the force f above the unsprung part m_u, which rests on the tyre k_t.',
  items: [
    { kind: 'block', corner: [88, 6], size: [50, 24], symbol: 'm', payload: true },
    { kind: 'block', corner: [58, 30], size: [110, 30], symbol: 'm₀' },
    { kind: 'spring', from: [78, 60], to: [78, 104], symbol: 'k_s', at: [56, 82] },
    { kind: 'damper', from: [113, 60], to: [113, 104], symbol: 'c_s', at: [133, 82] },
    { kind: 'force', from: [152, 100], to: [152, 64], symbol: 'f', at: [164, 82] },
    { kind: 'block', corner: [68, 104], size: [90, 24], symbol: 'm_u' },
    { kind: 'spring', from: [113, 128], to: [113, 160], symbol: 'k_t', at: [91, 146] },
    { kind: 'ground', from: [70, 160], to: [156, 160] },
    { kind: 'motion', from: [196, 58], to: [196, 34], symbol: 'z_s', at: [211, 44] },
    { kind: 'motion', from: [196, 128], to: [196, 104], symbol: 'z_u', at: [211, 114] },
  ],
};
