import { describe, expect, it } from 'vitest';
import type { Study } from '../../contracts';
import { evaluateProgram, type NodeId } from '../../expressions';
import { buildLoop } from '../loop/build-loop';
import { composeStudy } from './compose-study';
import type { ComposedStudy } from './composed-study';
import { NominalValues } from '../loop/nominal-values';
import { composed, faults, faultsOf, FIRST_ORDER, LIFT_TABLE, studyOf } from './testing/lift-table';

/** Values of nodes at the nominal point. */
function valuesOf({ program, parameters }: ComposedStudy): (node: NodeId) => number {
  const values = new Float64Array(program.operations.length);
  evaluateProgram(
    program,
    parameters.map(({ nominal }) => nominal),
    values,
  );
  return (node) => values[node];
}

const orderOf = (study: ComposedStudy) =>
  buildLoop(study.loop, (node) =>
    new NominalValues(
      study.program,
      study.parameters.map(({ nominal }) => nominal),
      (index) => study.parameters[index].hasBand || index === study.payload,
    ).constant(node),
  ).order;

describe('composeStudy', () => {
  it('gives parameters in SI', () => {
    const { parameters, payload } = composed(LIFT_TABLE);
    expect(payload).toBe(0);
    expect(parameters.map(({ id }) => id)).toEqual(['m', 'k', 'c', 'tau', 'M', 'm0']);
    expect(parameters[1]).toMatchObject({
      nominal: 150000,
      low: 120000,
      high: 185000,
      minimum: 0,
      hasBand: true,
    });
    expect(parameters[1].unit?.label).toBe('kN/m');
    expect(parameters[2]).toMatchObject({
      unit: undefined,
      minimum: -Infinity,
      maximum: Infinity,
      kind: 'tolerance',
    });
    expect(parameters[3]).toMatchObject({ nominal: 0.008, low: 0.005, high: 0.011, minimum: 0.0001 });
    expect(parameters[4]).toMatchObject({ nominal: 180, low: 180, high: 180, hasBand: false });
    expect(parameters[0].kind).toBe('use');
  });

  it('writes M, D, K in ascending powers and leaves zeros as node 0', () => {
    const study = composed(LIFT_TABLE);
    const value = valuesOf(study);
    const { machine, actuators, sensor, sampling, laws } = study.loop;
    expect(machine.coefficients.map((matrix) => matrix.map((row) => row.map(value)))).toEqual([
      [
        [150000, -150000],
        [-150000, 150000],
      ],
      [
        [620, -620],
        [-620, 620],
      ],
      [
        [180, 0],
        [0, 420],
      ],
    ]);
    expect(machine.coefficients[2][0][1]).toBe(study.program.zero);
    expect(study.program.zero).toBe(0);
    expect(machine.outputs.get('speed')?.position).toEqual([0, 0]);
    expect(machine.outputs.get('speed')?.velocity.map(value)).toEqual([0, 1]);
    expect(laws).toHaveLength(1);
    expect(value(actuators[0].lag)).toBe(0.008);
    expect(actuators[0].delay).toBe(0);
    expect(sensor).toEqual({ lag: 0, delay: 0, padeOrder: 2 });
    expect(sampling).toEqual({ lag: 0, delay: 0, padeOrder: 2 });
    expect(orderOf(study)).toBe(7);
  });

  it('writes −A and E, the identity where the descriptor is left out', () => {
    const plain = composed(FIRST_ORDER);
    expect(
      plain.loop.machine.coefficients.map((matrix) => matrix.map((row) => row.map(valuesOf(plain)))),
    ).toEqual([[[2]], [[1]]]);
    const descriptor = { ...FIRST_ORDER.machine, descriptor: [['q*p']] };
    const study = composed(FIRST_ORDER, { machine: descriptor });
    expect(valuesOf(study)(study.loop.machine.coefficients[1][0][0])).toBe(4);
  });

  it('turns a transfer function round and drops leading zeros, also those of exact parameters', () => {
    const study = composed(FIRST_ORDER, {
      control: {
        law: 'transfer-function',
        input: 'u',
        output: 'y',
        numerator: [0, 3, 'p'],
        denominator: ['q - 2', 1, 5, 6],
      },
    });
    const law = study.loop.laws[0];
    expect(law.law).toBe('transfer-function');
    if (law.law !== 'transfer-function') return;
    expect(law.numerator.map(valuesOf(study))).toEqual([2, 3]);
    expect(law.denominator.map(valuesOf(study))).toEqual([6, 5, 1]);
  });

  it('refuses a transfer function that is improper by the values of its parameters', () => {
    const control = {
      law: 'transfer-function',
      input: 'u',
      output: 'y',
      numerator: [1, 0],
      denominator: ['q - 2', 1],
    };
    expect(faults(FIRST_ORDER, { control })).toEqual([
      'control.numerator: must not be of higher degree than the denominator',
    ]);
    expect(
      faults(FIRST_ORDER, { control: { ...control, numerator: ['1'], denominator: ['q - 2'] } }),
    ).toEqual(['control.denominator: must not be zero']);
    expect(faults(FIRST_ORDER, { control: { ...control, denominator: ['p - 2', 1] } })).toEqual([
      'control.denominator: the leading coefficient is 0 at p = 2; it must not be 0 anywhere in the bands',
    ]);
  });

  it('composes state feedback by unknown and number of dots', () => {
    const study = composed(LIFT_TABLE, {
      control: {
        law: 'state-feedback',
        input: 'u',
        gains: { q2: 'k/1000', "q1'": -3 },
        integral: { output: 'drive', gain: 7 },
      },
    });
    const value = valuesOf(study);
    const law = study.loop.laws[0];
    if (law.law !== 'state-feedback') throw new Error('a state feedback');
    expect(law.gains.map(({ unknown, dots, gain }) => [unknown, dots, value(gain)])).toEqual([
      [1, 0, 150],
      [0, 1, -3],
    ]);
    expect(value(law.integral?.gain ?? 0)).toBe(7);
    expect(orderOf(study)).toBe(6);
  });

  it('composes a state-space law', () => {
    const study = composed(FIRST_ORDER, {
      control: {
        law: 'state-space',
        input: 'u',
        output: 'y',
        A: [
          [-1, 2],
          ['q', 0],
        ],
        B: [1, 0],
        C: [0, 'p'],
        D: 4,
      },
    });
    const law = study.loop.laws[0];
    if (law.law !== 'state-space') throw new Error('a state-space law');
    const value = valuesOf(study);
    expect(law.a.map((row) => row.map(value))).toEqual([
      [-1, 2],
      [2, 0],
    ]);
    expect([law.b, law.c].map((column) => column.map(value))).toEqual([
      [1, 0],
      [0, 2],
    ]);
    expect(value(law.d)).toBe(4);
  });

  it('delays a digital controller by one and a half periods, and gives actuators law by law', () => {
    const study = composed(LIFT_TABLE, {
      control: [
        { law: 'pid', input: 'u', output: 'drive', kp: 1, ki: 0, kd: 0 },
        { law: 'pid', input: 'v', output: 'speed', kp: 1, ki: 0, kd: 0 },
      ],
      actuator: [{ delay: 0.01, padeOrder: 3 }, {}],
      sensor: { lag: 0.002 },
      sampling: { period: 0.004, padeOrder: 1 },
    });
    const value = valuesOf(study);
    const { actuators, sensor, sampling } = study.loop;
    expect(actuators.map(({ lag, delay, padeOrder }) => [value(lag), value(delay), padeOrder])).toEqual([
      [0, 0.01, 3],
      [0, 0, 2],
    ]);
    expect(value(sensor.lag)).toBe(0.002);
    expect([sampling.lag, value(sampling.delay), sampling.padeOrder]).toEqual([0, 0.006, 1]);
  });

  it('expands a template', () => {
    const template = {
      machine: { template: 'mass-spring-damper' },
      parameters: [
        { id: 'm', nominal: 20, low: 5, high: 40 },
        { id: 'm0', nominal: 12 },
        { id: 'k', nominal: 8, unit: 'N/mm' },
      ],
      definitions: { c: '0.01*k + q', q: 'p', p: '70' },
      payload: 'm',
      control: { law: 'pid', input: 'u', output: 'q', kp: 1, ki: 0, kd: 0 },
      actuator: undefined,
    };
    const study = composed(LIFT_TABLE, template);
    expect(study.loop.machine.coefficients.map((matrix) => matrix[0].map(valuesOf(study)))).toEqual([
      [8000],
      [150],
      [32],
    ]);
  });

  it('does without control', () => {
    const { control, actuator, ...rest } = studyOf(LIFT_TABLE);
    expect([control, actuator]).not.toContain(undefined);
    const study = composeStudy(rest);
    expect(study.loop.laws).toEqual([]);
    expect(study.requirements).toEqual([
      { measure: 'stability', limit: 0, law: -1 },
      { measure: 'dampingRatio', limit: 0.15, law: -1 },
    ]);
    const margin = { ...rest, requirements: [{ measure: 'gainMargin', atLeast: 2 }] } as Study;
    expect(faultsOf(margin)).toEqual([
      'requirements[0].measure: a margin needs a loop that can be broken; add a law under control',
    ]);
  });

  it('tells all faults at once', () => {
    expect(
      faults(LIFT_TABLE, {
        searchUpTo: 'm0 + zz',
        definitions: { a: '1/(M - 180)', b: 'nothing' },
        actuator: { lag: '-M/1000' },
      }),
    ).toEqual([
      'definitions.a: division by zero',
      'searchUpTo: unknown parameter or definition "zz" (column 6)',
      'definitions.b: unknown parameter or definition "nothing" (column 1)',
      'actuator.lag: must not be negative',
    ]);
  });
});
