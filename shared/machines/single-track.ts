import type { MachineTemplate } from './template';

/** Way of the common centre of mass behind the unladen one, and the axles' distances from it. */
const e = 'm*xp/(m0 + m)';
const front = `(lf + ${e})`;
const rear = `(lr - ${e})`;

/** Two masses about their common centre: the unladen vehicle's inertia plus the reduced mass at the distance xp. */
const yawInertia = 'J0 + m0*m*xp^2/(m0 + m)';

/** Moment balance of the cornering stiffnesses. */
const steer = `cf*${front} - cr*${rear}`;

/**
 * Lateral velocity vy and yaw rate r at the common centre of mass, speed V:
 *
 * (m0 + m) vy′ = −(cf + cr)/V vy − (s/V + (m0 + m) V) r + cf delta + sidewind,
 * J r′ = −s/V vy − (cf lf′² + cr lr′²)/V r + lf′ cf delta,
 *
 * s = cf lf′ − cr lr′, lf′ = lf + e, lr′ = lr − e, e = m xp/(m0 + m), J = J0 + m0 m xp²/(m0 + m).
 */
export const singleTrack: MachineTemplate = {
  id: 'single-track',
  label: 'Steered light vehicle, single track',
  purpose:
    'Steering control of a loaded four-wheeled vehicle at a given speed: carts, shuttles and light transporters with goods behind or ahead of the centre.',
  leavesOut: 'Roll, load transfer between the wheels, saturation of the tyres and the lag of their forces.',
  source:
    'Linear single-track model as in Mitschke & Wallentowitz, Dynamik der Kraftfahrzeuge, and Rajamani, Vehicle Dynamics and Control (cited from memory).',
  parameters: [
    {
      id: 'm',
      label: 'Payload',
      symbol: 'm',
      unit: 'kg',
      nominal: 250,
      low: 0,
      high: 500,
      minimum: 0,
      kind: 'use',
      hint: 'Taken as a point mass at xp.',
    },
    {
      id: 'm0',
      label: 'Vehicle, unladen',
      symbol: 'm₀',
      unit: 'kg',
      nominal: 900,
      minimum: 1,
      hint: 'With the driver, where there is one.',
    },
    {
      id: 'J0',
      label: 'Yaw inertia, unladen',
      symbol: 'J₀',
      unit: 'kg m^2',
      nominal: 1100,
      low: 1000,
      high: 1200,
      minimum: 1,
      hint: 'About the unladen centre of mass.',
    },
    {
      id: 'lf',
      label: 'Front axle to centre of mass',
      symbol: 'l_f',
      unit: 'm',
      nominal: 1,
      minimum: 0,
      hint: 'Unladen; the payload moves the centre.',
    },
    {
      id: 'lr',
      label: 'Rear axle to centre of mass',
      symbol: 'l_r',
      unit: 'm',
      nominal: 1.2,
      minimum: 0,
      hint: 'Unladen; the payload moves the centre.',
    },
    {
      id: 'xp',
      label: 'Payload behind the centre of mass',
      symbol: 'x_p',
      unit: 'm',
      nominal: 0.4,
      low: 0,
      high: 0.8,
      kind: 'use',
      hint: 'From the unladen centre of mass; negative when ahead of it.',
    },
    {
      id: 'V',
      label: 'Speed',
      symbol: 'V',
      unit: 'm/s',
      nominal: 15,
      low: 8,
      high: 22,
      minimum: 1,
      kind: 'use',
      hint: 'Held during the manoeuvre; must stay above 0.',
    },
    {
      id: 'cf',
      label: 'Cornering stiffness, front axle',
      symbol: 'c_f',
      unit: 'N/rad',
      nominal: 60000,
      low: 50000,
      high: 70000,
      minimum: 0,
      kind: 'wear',
      hint: 'Both wheels of the axle together.',
    },
    {
      id: 'cr',
      label: 'Cornering stiffness, rear axle',
      symbol: 'c_r',
      unit: 'N/rad',
      nominal: 75000,
      low: 65000,
      high: 85000,
      minimum: 0,
      kind: 'wear',
      hint: 'Both wheels of the axle together.',
    },
  ],
  signals: {
    vy: { label: 'lateral velocity', unit: 'm/s' },
    r: { label: 'yaw rate', unit: 'rad/s' },
    delta: { label: 'steering angle', unit: 'rad' },
  },
  machine: {
    states: ['vy', 'r'],
    descriptor: [
      ['m0 + m', '0'],
      ['0', yawInertia],
    ],
    dynamics: [
      ['-(cf + cr)/V', `-(${steer})/V - (m0 + m)*V`],
      [`-(${steer})/V`, `-(cf*${front}^2 + cr*${rear}^2)/V`],
    ],
    inputs: { delta: ['cf', `${front}*cf`] },
    disturbances: { sidewind: ['1', '0'] },
    outputs: { r: ['0', '1'], vy: ['1', '0'] },
  },
};
