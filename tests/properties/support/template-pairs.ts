/** A template, values for it, a law, and the same machine written out by hand in first order, E x′ = A x + B u. */
export interface TemplatePair {
  readonly template: string;
  readonly parameters: readonly object[];
  readonly control: object;
  readonly handControl?: object;
  readonly requirements: readonly object[];
  readonly machine: object;
}

const exact = (values: Record<string, number>): object[] =>
  Object.entries(values).map(([id, nominal]) => ({ id, nominal }));
const banded = (id: string, low: number, nominal: number, high: number): object => ({
  id,
  low,
  nominal,
  high,
});

export const TEMPLATE_PAIRS: readonly TemplatePair[] = [
  {
    template: 'mass-spring-damper',
    parameters: [banded('m', 5, 20, 30), banded('k', 7000, 8000, 9000), ...exact({ m0: 12, c: 150 })],
    control: { law: 'pid', input: 'u', output: 'q', kp: 3000, ki: 6000, kd: 60, derivativeTime: 0.01 },
    requirements: [{ measure: 'dampingRatio', atLeast: 0.15 }],
    machine: {
      states: ['q', 'v'],
      dynamics: [
        [0, 1],
        ['-k/(m0 + m)', '-c/(m0 + m)'],
      ],
      inputs: { u: [0, '1/(m + m0)'] },
      outputs: { q: [1, 0] },
    },
  },
  {
    template: 'two-mass-drive',
    parameters: [
      banded('m', 40, 300, 480),
      banded('k', 120000, 150000, 185000),
      banded('c', 470, 620, 800),
      ...exact({ M: 180, m0: 120, b: 30 }),
    ],
    control: {
      law: 'pid',
      input: 'u',
      output: 'drive',
      kp: 9400,
      ki: 11000,
      kd: 4100,
      derivativeTime: 0.002,
    },
    requirements: [{ measure: 'modulusMargin', atLeast: 0.5 }],
    machine: {
      states: ['q1', 'q2', 'v1', 'v2'],
      descriptor: [
        [1, 0, 0, 0],
        [0, 1, 0, 0],
        [0, 0, 'M', 0],
        [0, 0, 0, 'm + m0'],
      ],
      dynamics: [
        [0, 0, 1, 0],
        [0, 0, 0, 1],
        ['-k', 'k', '-b - c', 'c'],
        ['k', '-k', 'c', '-c'],
      ],
      inputs: { u: [0, 0, 1, 0] },
      outputs: { drive: [1, 0, 0, 0], carriage: [0, 1, 0, 0] },
    },
  },
  {
    template: 'balancing-carrier',
    parameters: [
      banded('m', 50, 75, 100),
      banded('h', 0.85, 0.95, 1.05),
      ...exact({ J: 8, Mb: 22, R: 0.2, c: 10, d: 1 }),
    ],
    control: { law: 'state-feedback', input: 'u', gains: { x: -40, "x'": -60, theta: -420, "theta'": -130 } },
    handControl: { law: 'state-feedback', input: 'u', gains: { x: -40, v: -60, theta: -420, rate: -130 } },
    requirements: [{ measure: 'decayRate', atLeast: 0.05 }],
    machine: {
      states: ['x', 'theta', 'v', 'rate'],
      descriptor: [
        [1, 0, 0, 0],
        [0, 1, 0, 0],
        [0, 0, 'Mb + m', 'h*m'],
        [0, 0, 'h*m', 'J + h*h*m'],
      ],
      dynamics: [
        [0, 0, 1, 0],
        [0, 0, 0, 1],
        [0, 0, '-c', 0],
        [0, 'm*g0*h', 0, '-d'],
      ],
      inputs: { u: [0, 0, '1/R', -1] },
      outputs: { tilt: [0, 1, 0, 0] },
    },
  },
  {
    template: 'suspended-cabin',
    parameters: [
      banded('m', 40, 90, 200),
      banded('ks', 15000, 16000, 17500),
      banded('cs', 800, 980, 1100),
      ...exact({ m0: 240, mu: 36, kt: 160000 }),
    ],
    control: { law: 'pid', input: 'f', output: 'cabinVelocity', kp: 1500, ki: 0, kd: 0 },
    requirements: [{ measure: 'gainMargin', atLeast: 1.6 }],
    machine: {
      states: ['zs', 'zu', 'vs', 'vu'],
      dynamics: [
        [0, 0, 1, 0],
        [0, 0, 0, 1],
        ['-ks/(m0 + m)', 'ks/(m0 + m)', '-cs/(m0 + m)', 'cs/(m0 + m)'],
        ['ks/mu', '-(ks + kt)/mu', 'cs/mu', '-cs/mu'],
      ],
      inputs: { f: [0, 0, '1/(m0 + m)', '-1/mu'] },
      outputs: { cabinVelocity: [0, 0, 1, 0] },
    },
  },
  {
    template: 'single-track',
    parameters: [
      banded('m', 100, 250, 500),
      banded('cr', 70000, 75000, 80000),
      ...exact({ m0: 900, J0: 1100, lf: 1, lr: 1.2, xp: 0.4, V: 15, cf: 60000 }),
    ],
    control: { law: 'pid', input: 'delta', output: 'r', kp: 0.3, ki: 0.6, kd: 0 },
    requirements: [{ measure: 'phaseMargin', atLeast: 1.2 }],
    // Balances about the unladen centre of mass; vy is measured there, so only what r sees agrees.
    machine: {
      states: ['vy', 'r'],
      descriptor: [
        ['m0 + m', '-m*xp'],
        ['-m*xp', 'J0 + m*xp^2'],
      ],
      dynamics: [
        ['-(cf + cr)/V', '-(lf*cf - lr*cr)/V - (m0 + m)*V'],
        ['-(lf*cf - lr*cr)/V', '-(lf^2*cf + lr^2*cr)/V + m*xp*V'],
      ],
      inputs: { delta: ['cf', 'lf*cf'] },
      outputs: { r: [0, 1] },
    },
  },
];
