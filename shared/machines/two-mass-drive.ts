import type { MachineTemplate } from './template';

/**
 * M q1″ + b q1′ + c (q1′ − q2′) + k (q1 − q2) = u,
 * (m0 + m) q2″ + c (q2′ − q1′) + k (q2 − q1) = push
 */
export const twoMassDrive: MachineTemplate = {
  id: 'two-mass-drive',
  label: 'Drive and carriage on an elastic link',
  purpose:
    'A motor drives a loaded carriage through a belt, screw, rope or column that gives: lift tables, transfer axes, linear drives.',
  leavesOut:
    'Backlash, dry friction, the mass of the link itself and a change of its stiffness along the travel.',
  parameters: [
    {
      id: 'm',
      label: 'Payload',
      symbol: 'm',
      unit: 'kg',
      nominal: 300,
      low: 40,
      high: 480,
      minimum: 0,
      kind: 'use',
      hint: 'The mass on the carriage.',
    },
    {
      id: 'm0',
      label: 'Carriage, unladen',
      symbol: 'm₀',
      unit: 'kg',
      nominal: 120,
      minimum: 0,
      hint: 'The carriage without a payload.',
    },
    {
      id: 'M',
      label: 'Drive',
      symbol: 'M',
      unit: 'kg',
      nominal: 180,
      minimum: 0,
      hint: 'Inertia of motor and transmission, as a mass at the link.',
    },
    {
      id: 'k',
      label: 'Link stiffness',
      symbol: 'k',
      unit: 'N/m',
      nominal: 150000,
      low: 120000,
      high: 185000,
      minimum: 0,
      hint: 'Stiffness between drive and carriage, at the travel considered.',
    },
    {
      id: 'c',
      label: 'Link damping',
      symbol: 'c',
      unit: 'N s/m',
      nominal: 620,
      low: 470,
      high: 800,
      minimum: 0,
      hint: 'Viscous damping between drive and carriage.',
    },
    {
      id: 'b',
      label: 'Friction of the drive',
      symbol: 'b',
      unit: 'N s/m',
      nominal: 200,
      low: 100,
      high: 300,
      minimum: 0,
      kind: 'wear',
      hint: 'Viscous friction between the drive and the ground; 0 is the careful choice.',
    },
  ],
  signals: {
    q1: { label: 'drive', unit: 'm' },
    q2: { label: 'carriage', unit: 'm' },
    u: { label: 'force on the drive', unit: 'N' },
    drive: { label: 'drive position', unit: 'm' },
    carriage: { label: 'carriage position', unit: 'm' },
  },
  machine: {
    coordinates: ['q1', 'q2'],
    mass: [
      ['M', '0'],
      ['0', 'm0 + m'],
    ],
    damping: [
      ['b + c', '-c'],
      ['-c', 'c'],
    ],
    stiffness: [
      ['k', '-k'],
      ['-k', 'k'],
    ],
    inputs: { u: ['1', '0'] },
    disturbances: { push: ['0', '1'] },
    outputs: { drive: { position: ['1', '0'] }, carriage: { position: ['0', '1'] } },
  },
};
