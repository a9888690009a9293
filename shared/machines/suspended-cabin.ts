import type { MachineTemplate } from './template';

/**
 * (m0 + m) zs″ + cs (zs′ − zu′) + ks (zs − zu) = f,
 * mu zu″ + cs (zu′ − zs′) + ks (zu − zs) + kt (zu − road) = −f
 */
export const suspendedCabin: MachineTemplate = {
  id: 'suspended-cabin',
  label: 'Suspended cabin',
  purpose:
    'A loaded cabin, seat or platform on an actively supported suspension above an unsprung part that rests on a tyre or pad.',
  leavesOut: 'Pitch and roll, end stops, lift-off of the tyre and its damping.',
  source: 'Quarter-vehicle model as in Hedrick & Butsuen 1990 (cited from memory).',
  parameters: [
    {
      id: 'm',
      label: 'Payload',
      symbol: 'm',
      unit: 'kg',
      nominal: 90,
      low: 50,
      high: 200,
      minimum: 0,
      kind: 'use',
      hint: 'People and goods in the cabin.',
    },
    {
      id: 'm0',
      label: 'Cabin, unladen',
      symbol: 'm₀',
      unit: 'kg',
      nominal: 240,
      minimum: 0,
      hint: 'The suspended part without a payload.',
    },
    {
      id: 'mu',
      label: 'Unsprung part',
      symbol: 'm_u',
      unit: 'kg',
      nominal: 36,
      minimum: 0,
      hint: 'Axle, wheel and what moves with them.',
    },
    {
      id: 'ks',
      label: 'Suspension stiffness',
      symbol: 'k_s',
      unit: 'N/m',
      nominal: 16000,
      low: 14400,
      high: 17600,
      minimum: 0,
      hint: 'Between cabin and unsprung part.',
    },
    {
      id: 'cs',
      label: 'Suspension damping',
      symbol: 'c_s',
      unit: 'N s/m',
      nominal: 980,
      low: 700,
      high: 1200,
      minimum: 0,
      kind: 'wear',
      hint: 'Between cabin and unsprung part.',
    },
    {
      id: 'kt',
      label: 'Tyre stiffness',
      symbol: 'k_t',
      unit: 'N/m',
      nominal: 160000,
      low: 140000,
      high: 180000,
      minimum: 0,
      hint: 'Between unsprung part and road.',
    },
  ],
  machine: {
    coordinates: ['zs', 'zu'],
    mass: [
      ['m0 + m', '0'],
      ['0', 'mu'],
    ],
    damping: [
      ['cs', '-cs'],
      ['-cs', 'cs'],
    ],
    stiffness: [
      ['ks', '-ks'],
      ['-ks', 'ks + kt'],
    ],
    inputs: { f: ['1', '-1'] },
    disturbances: { road: ['0', 'kt'] },
    outputs: {
      cabin: { position: ['1', '0'] },
      stroke: { position: ['1', '-1'] },
      cabinVelocity: { velocity: ['1', '0'] },
    },
  },
};
