import { describe, expect, it } from 'vitest';
import { composed, faults, FIRST_ORDER, LIFT_TABLE } from './testing/lift-table';

const withParameters = (...parameters: object[]) => ({
  parameters: [...FIRST_ORDER.parameters, ...parameters],
});

describe('numbers of parameters', () => {
  it('see SI values and give values in their own unit', () => {
    const study = composed(FIRST_ORDER, {
      ...withParameters(
        { id: 'a', unit: 'mm', nominal: '500*b', low: '400*b', high: 'twice*500' },
        { id: 'b', unit: 'cm', nominal: 200 },
      ),
      definitions: { twice: '2*b' },
    });
    expect(study.parameters[2]).toMatchObject({ nominal: 1, low: 0.8, high: 2, hasBand: true });
    expect(study.parameters[3]).toMatchObject({ nominal: 2, hasBand: false });
  });

  it('start or end a band at the nominal where one end is left out; a band of no width is exact', () => {
    const study = composed(
      FIRST_ORDER,
      withParameters({ id: 'a', nominal: 1, high: 2 }, { id: 'b', nominal: 1, low: 1, high: 1 }),
    );
    expect(study.parameters[2]).toMatchObject({ low: 1, high: 2, hasBand: true });
    expect(study.parameters[3]).toMatchObject({ low: 1, high: 1, hasBand: false });
  });

  it.each<[string, object[], string]>([
    [
      'a band',
      [{ id: 'a', nominal: '2*p' }],
      'parameters[2].nominal: "p" has a band or depends on one; only exact parameters may be used here (column 3)',
    ],
    [
      'a band through a definition',
      [{ id: 'a', nominal: 1, high: 'd' }],
      'parameters[2].high: "d" has a band or depends on one; only exact parameters may be used here (column 1)',
    ],
    [
      'an unknown name',
      [{ id: 'a', nominal: 'x + 1' }],
      'parameters[2].nominal: unknown parameter or definition "x" (column 1)',
    ],
    [
      'order by value',
      [{ id: 'a', nominal: 1, low: 'q' }],
      'parameters[2].low: must not be above nominal (2 > 1)',
    ],
    ['a division by zero', [{ id: 'a', nominal: '1/(q - 2)' }], 'parameters[2].nominal: division by zero'],
    ['a root', [{ id: 'a', nominal: 'sqrt(-q)' }], 'parameters[2].nominal: root of a negative number'],
    [
      'a logarithm',
      [{ id: 'a', nominal: 'log(q - 2)' }],
      'parameters[2].nominal: logarithm of a number that is not above 0',
    ],
    [
      'a power',
      [{ id: 'a', nominal: '(-q)^0.5' }],
      'parameters[2].nominal: power of a negative number with an exponent that is not whole',
    ],
    ['too large', [{ id: 'a', nominal: 'exp(1000*q)' }], 'parameters[2].nominal: is too large for a number'],
    [
      'too large in SI',
      [{ id: 'a', unit: 't', nominal: 1e307 }],
      'parameters[2].nominal: is too large for a number in SI',
    ],
    [
      'a syntax error',
      [{ id: 'a', nominal: '2*(1 + q' }],
      'parameters[2].nominal: this bracket is not closed (column 3)',
    ],
    ['itself', [{ id: 'a', nominal: '2*a' }], 'parameters[2].nominal: depends on itself: a → a'],
    [
      'a cycle',
      [
        { id: 'a', nominal: 1, high: 'b' },
        { id: 'b', nominal: 'a' },
      ],
      'parameters[2].high: depends on itself: a → b → a',
    ],
    [
      'a cycle through a definition',
      [{ id: 'a', nominal: 'e' }],
      'definitions.e: depends on itself: e → a → e',
    ],
  ])('refuse %s', (_, parameters, fault) => {
    const e = fault.startsWith('definitions.e') ? { e: '2*a' } : {};
    expect(
      faults(FIRST_ORDER, { ...withParameters(...parameters), definitions: { d: '3*p', ...e } }),
    ).toEqual([fault]);
  });
});

describe('definitions', () => {
  it('may stand in any order', () => {
    const study = composed(FIRST_ORDER, {
      definitions: { a: 'b + b', b: 'd*p', d: '3' },
      machine: { ...FIRST_ORDER.machine, dynamics: [['-a']] },
    });
    expect(study.boundsUndecided).toBe(false);
  });

  it('must not go round', () => {
    expect(faults(FIRST_ORDER, { definitions: { a: 'b', b: 'd + 1', d: 'a', e: 'a' } })).toEqual([
      'definitions.a: depends on itself: a → b → d → a',
    ]);
  });

  it('may be chained long, but not endlessly, and without a crash', () => {
    const chain = (length: number) =>
      Object.fromEntries(Array.from({ length }, (_, i) => [`d${i}`, i === 0 ? 'p' : `d${i - 1} + 1`]));
    expect(faults(FIRST_ORDER, { definitions: chain(1000) })).toEqual([]);
    expect(faults(FIRST_ORDER, { definitions: chain(20000) })).toEqual([
      'definitions.d1501: chains more than 1500 operations through definitions',
    ]);
    const long = Object.fromEntries(
      Array.from({ length: 20000 }, (_, i) => [`d${i}`, `d${(i + 1) % 20000}`]),
    );
    expect(faults(FIRST_ORDER, { definitions: long })).toEqual([
      'definitions.d0: depends on itself: d0 → d1 → d2 → d3 → d4 → d5 → d6 → d7 → …',
    ]);
  });

  it('tell unknown names and syntax errors with their place', () => {
    expect(faults(FIRST_ORDER, { definitions: { a: 'p + unknown', b: '2 2' } })).toEqual([
      'definitions.b: an operator is missing before "2" (column 3)',
      'definitions.a: unknown parameter or definition "unknown" (column 5)',
    ]);
  });
});

describe('entries', () => {
  it('tell their place', () => {
    const machine = {
      ...LIFT_TABLE.machine,
      mass: [
        ['process.exit(7)', '0'],
        ['0', 'constructor'],
      ],
    };
    expect(faults(LIFT_TABLE, { machine })).toEqual([
      'machine.mass[0][0]: the character "." has no meaning here (column 8)',
      'machine.mass[1][1]: unknown parameter or definition "constructor" (column 1)',
    ]);
  });

  it('of inputs, outputs, laws and hardware likewise', () => {
    const machine = {
      ...LIFT_TABLE.machine,
      inputs: { u: ['x1', '0'] },
      disturbances: { push: ['0', 'x2'] },
      outputs: { drive: { position: ['x3', '0'] } },
    };
    const control = { ...LIFT_TABLE.control, kp: 'x4', derivativeTime: 'x5' };
    const found = faults(LIFT_TABLE, {
      machine,
      control,
      actuator: { lag: 'x6' },
      sampling: { period: 'x7' },
    });
    expect(found.map((fault) => fault.split(':')[0])).toEqual([
      'machine.inputs.u[0]',
      'machine.disturbances.push[1]',
      'machine.outputs.drive.position[0]',
      'control.kp',
      'control.derivativeTime',
      'actuator.lag',
      'sampling.period',
    ]);
  });

  it('of a template are told at the machine', () => {
    const changes = {
      machine: { template: 'mass-spring-damper' },
      control: { law: 'pid', input: 'f', output: 'drive', kp: 1, ki: 0, kd: 0 },
      actuator: undefined,
    };
    const found = faults(LIFT_TABLE, {
      ...changes,
      parameters: LIFT_TABLE.parameters.filter(({ id }) => id !== 'm0'),
    });
    expect(found[0]).toBe('control.input: unknown input "f"; the machine has u');
    expect(found[1]).toBe('control.output: unknown output "drive"; the machine has q');
    expect(found[2]).toMatch(/^parameters: the template mass-spring-damper needs m0/);
    expect(found).toHaveLength(3);
  });
});
