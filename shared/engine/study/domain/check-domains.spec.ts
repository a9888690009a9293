import { describe, expect, it } from 'vitest';
import { composed, faults, firstOrder, FIRST_ORDER, LIFT_TABLE } from '../testing/lift-table';

const P = { id: 'p', nominal: 2, low: 1, high: 3 };

describe('expressions over the bands', () => {
  it.each<[string, string]>([
    ['1/(p - 3)', 'division by zero at p = 3'],
    ['1/(p - 1.7)', 'division by zero at p = 1.7'],
    ['1/(p - 2)^2', 'division by zero at p = 2'],
    ['1/(p^2 - q)', 'division by zero at p = 1.4142136'],
    ['1/(1/(p - 4) + 1/q)', 'division by zero at p = 2'],
    ['1/(p - p)', 'division by zero at p = 2'],
    ['1/(sin(p) - 0.5)', 'division by zero at p = 2.6179939'],
    ['(p - 1.7)^-1', 'division by zero at p = 1.7'],
    ['(p - 1)^(-q)', 'division by zero at p = 1'],
    ['sqrt(p - 1.5)', 'root of a negative number at p = 1'],
    ['sqrt((p - 1.5)*(p - 1.6))', 'root of a negative number at p = 1.5625'],
    ['log(p - 1)', 'logarithm of a number that is not above 0 at p = 1'],
    ['(p - 2)^0.5', 'power of a negative number with an exponent that is not whole at p = 1'],
    ['(p - 1)^(p - 1.5)', 'power of 0 with an exponent that may be negative at p = 1'],
    ['tan(p)', 'pole of tan at p = 1.5707963'],
    ['1/(q - 2)', 'division by zero'],
    ['sqrt(1 - q)', 'root of a negative number'],
    ['exp(1000*q)', 'is too large for a number at the nominal values'],
  ])('%s', (dynamics, message) => {
    expect(faults(FIRST_ORDER, { machine: firstOrder(dynamics) })).toEqual([
      `machine.dynamics[0][0]: ${message}`,
    ]);
  });

  it.each([
    '1/p',
    '1/(p - 0.999)',
    '1/(p*p - 2*p + 1.001)',
    'sqrt(p - 1)',
    'sqrt(p*p - 2*p + 1)',
    'sqrt(3*p - p*p)',
    'sqrt(abs(p - 2))',
    'p^0.5',
    '(p - 2)^2',
    '(p - 1)^0.5',
    '(p - 1)^(p - 1)',
    'log(p)',
    'tan(p/2)',
    '0^p',
    '1/(1 + sin(p))',
    '1/(2 - sin(p) - cos(p)*p/3)',
  ])('%s is defined everywhere', (dynamics) => {
    expect(composed(FIRST_ORDER, { machine: firstOrder(dynamics) }).boundsUndecided).toBe(false);
  });

  it.each(['1/(p^2 - 3)^2', '1/abs(sin(p) - 0.7)'])('%s is left open', (dynamics) => {
    expect(composed(FIRST_ORDER, { machine: firstOrder(dynamics) }).boundsUndecided).toBe(true);
  });

  it('takes no change of sign through a pole for a zero', () => {
    expect(faults(FIRST_ORDER, { machine: firstOrder('1/(1/(sin(p) - 0.5))') })).toEqual([
      'machine.dynamics[0][0]: division by zero at p = 2.6179939',
    ]);
  });

  it('shows points in the units of the parameters, in the study’s order', () => {
    const parameters = [
      { id: 'h', unit: 'mm', nominal: 500, low: 400, high: 600 },
      { id: 'l', unit: 'm', nominal: 1, low: 0.55, high: 1.2 },
      { ...P },
    ];
    expect(faults(FIRST_ORDER, { parameters, machine: firstOrder('p/(l - h)') })).toEqual([
      expect.stringMatching(/^machine\.dynamics\[0\]\[0\]: division by zero at h = [\d.]+, l = [\d.]+$/),
    ]);
  });

  it('judges definitions, even those that nothing uses, once and where they stand', () => {
    const definitions = { ratio: '1/(p - 1)', unused: 'sqrt(-p)' };
    expect(faults(FIRST_ORDER, { definitions, machine: firstOrder('ratio + ratio^2') })).toEqual([
      'definitions.ratio: division by zero at p = 1',
      'definitions.unused: root of a negative number at p = 2',
    ]);
  });

  it('finds a zero that lies off corners and centres of two bands', () => {
    const parameters = [P, { id: 'q', nominal: 2, low: 1, high: 3 }];
    const machine = firstOrder('1/((p - 1.3)^2 + (q - 1.2)^2 - 0.01)');
    expect(faults(FIRST_ORDER, { parameters, machine })).toEqual([
      expect.stringMatching(/^machine\.dynamics\[0\]\[0\]: division by zero at p = 1\.\d+, q = 1\.\d+$/),
    ]);
  });

  it('tells a template’s faults at the machine', () => {
    const machine = { template: 'balancing-carrier' };
    const parameters = [
      ...['m', 'h', 'J', 'Mb', 'c', 'd'].map((id) => ({ id, nominal: 1 })),
      { id: 'R', nominal: 0.2, low: 0, high: 0.4 },
    ];
    const control = { law: 'state-feedback', input: 'u', gains: { x: 1 } };
    expect(faults(FIRST_ORDER, { machine, parameters, control })).toEqual([
      'machine: division by zero at R = 0',
    ]);
  });
});

describe('mass and descriptor matrix', () => {
  const mass = (...rows: string[][]) => ({ machine: { ...LIFT_TABLE.machine, mass: rows } });

  it.each<[string[][], string]>([
    [
      [
        ['M', '0'],
        ['0', 'm - 480'],
      ],
      'the mass matrix is singular at m = 480',
    ],
    [
      [
        ['m', 'm0'],
        ['m0', 'M'],
      ],
      'the mass matrix is singular at m = 80',
    ],
    [
      [
        ['M', 'M'],
        ['M', 'M'],
      ],
      'the mass matrix is singular',
    ],
    [
      [
        ['m', 'm'],
        ['m', 'm'],
      ],
      'the mass matrix is singular at m = 300',
    ],
    [
      [
        ['1', '0'],
        ['0', '1/(m - 20) - 0.005'],
      ],
      'the mass matrix is singular at m = 220',
    ],
    [
      [
        ['1', '0'],
        ['0', '9 - sqrt(m)'],
      ],
      'the mass matrix is singular at m = 81',
    ],
  ])('%j', (rows, message) => {
    expect(faults(LIFT_TABLE, mass(...rows))).toEqual([`machine.mass: ${message}`]);
  });

  it.each<[string[][], boolean]>([
    [
      [
        ['m', 'm - 1'],
        ['m - 1', 'm'],
      ],
      false,
    ],
    [
      [
        ['1', '0'],
        ['0', '5 + sin(m)'],
      ],
      false,
    ],
    [
      [
        ['(m^2 - 90001)^2', '0'],
        ['0', '1'],
      ],
      true,
    ],
  ])('%j is not refused', (rows, undecided) => {
    expect(composed(LIFT_TABLE, mass(...rows)).boundsUndecided).toBe(undecided);
  });

  it('is judged exactly where doubles cancel', () => {
    expect(composed(LIFT_TABLE, mass(['m', 'm'], ['m', 'm*1.0000000000000002'])).boundsUndecided).toBe(false);
  });

  it('is told for a descriptor and for a template', () => {
    expect(faults(FIRST_ORDER, { machine: firstOrder('-p', 'p - 1.5') })).toEqual([
      'machine.descriptor: the descriptor matrix is singular at p = 1.5',
    ]);
    expect(
      faults(LIFT_TABLE, {
        machine: { template: 'mass-spring-damper' },
        control: { law: 'pid', input: 'u', output: 'q', kp: 1, ki: 0, kd: 0 },
        parameters: [
          { id: 'm', nominal: 1, low: 0, high: 2 },
          { id: 'm0', nominal: 0 },
          { id: 'k', nominal: 1 },
          { id: 'c', nominal: 1 },
        ],
        actuator: undefined,
      }),
    ).toEqual(['machine: the mass matrix is singular at m = 0']);
  });
});

describe('lags and delays', () => {
  it('are not negative where they are exact', () => {
    expect(
      faults(FIRST_ORDER, {
        actuator: { lag: '-q', delay: 'q - 2' },
        sensor: { lag: '0*q', delay: '-1' },
        sampling: { period: 'q - 2' },
        control: { ...FIRST_ORDER.control, kd: 1, derivativeTime: '-q' },
      }),
    ).toEqual([
      'actuator.lag: must not be negative',
      'sensor.delay: must not be negative',
      'sampling.period: must be above 0',
      'control.derivativeTime: must not be negative',
    ]);
  });

  it('stay above 0 where they have a band', () => {
    const message = 'must be above 0 throughout its band, but is not at p = 1; give a low end above 0';
    expect(
      faults(FIRST_ORDER, {
        actuator: { lag: 'p - 1', delay: 'p - 0.9' },
        sensor: { delay: '(p - 1)*2' },
        sampling: { period: 'p - 1.5' },
        control: { ...FIRST_ORDER.control, kd: 1, derivativeTime: 'p^2 - p' },
      }),
    ).toEqual(
      ['actuator.lag', 'sensor.delay', 'sampling.period', 'control.derivativeTime'].map(
        (path) => `${path}: ${message}`,
      ),
    );
  });
});
