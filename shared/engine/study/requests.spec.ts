import { describe, expect, it } from 'vitest';
import { composed, faults, LIFT_TABLE } from './testing/lift-table';

const TWO_LAWS = [
  { law: 'pid', input: 'u', output: 'drive', kp: 1, ki: 0, kd: 0 },
  { law: 'pid', input: 'v', output: 'speed', kp: 1, ki: 0, kd: 0 },
];
const BANDED = '"k" has a band or depends on one; only exact parameters may be used here (column 1)';
const EXACT = { parameters: [...LIFT_TABLE.parameters, { id: 'half', nominal: 0.5 }] };

describe('requirements', () => {
  it('begin with stability and keep the strictest of each measure and law', () => {
    const { requirements } = composed(LIFT_TABLE, {
      ...EXACT,
      control: TWO_LAWS,
      requirements: [
        { measure: 'modulusMargin', atLeast: 0.4, input: 'v' },
        { measure: 'modulusMargin', atLeast: 'half' },
        { measure: 'modulusMargin', atLeast: 0.3, input: 'u' },
        { measure: 'decayRate', atLeast: 0.1 },
        { measure: 'decayRate', atLeast: '2*half' },
        { measure: 'stability' },
      ],
    });
    expect(requirements).toEqual([
      { measure: 'stability', limit: 0, law: 0 },
      { measure: 'modulusMargin', limit: 0.4, law: 1 },
      { measure: 'modulusMargin', limit: 0.5, law: 0 },
      { measure: 'decayRate', limit: 1, law: 0 },
    ]);
  });

  it('have levels in their range and of exact parameters', () => {
    expect(
      faults(LIFT_TABLE, {
        requirements: [
          { measure: 'dampingRatio', atLeast: 'm0' },
          { measure: 'phaseMargin', atLeast: '30 + 0' },
          { measure: 'decayRate', atLeast: 'k' },
        ],
      }),
    ).toEqual([
      'requirements[0].atLeast: must be at least 0 and below 1',
      'requirements[1].atLeast: is in rad and must be below π; 30 degrees are 0.5236',
      `requirements[2].atLeast: ${BANDED}`,
    ]);
  });
});

describe('searches', () => {
  it('are undefined unless given, and come from the unit of the payload', () => {
    expect(composed(LIFT_TABLE)).toMatchObject({ searchUpTo: undefined, searchDownTo: undefined });
    const tonnes = {
      parameters: [
        { id: 'm', unit: 't', nominal: 0.3, low: 0.04, high: 0.48, minimum: 0.01, maximum: 2 },
        ...LIFT_TABLE.parameters.slice(1),
      ],
    };
    const study = composed(LIFT_TABLE, { ...tonnes, searchUpTo: '2*0.6', searchDownTo: 0 });
    expect(study).toMatchObject({ searchUpTo: 1200, searchDownTo: 10 });
    expect(study.warnings).toEqual([
      { path: 'searchDownTo', message: "lies below the payload's minimum; the search ends there" },
    ]);
    expect(composed(LIFT_TABLE, { ...tonnes, searchUpTo: 5 })).toMatchObject({
      searchUpTo: 2000,
      warnings: [{ path: 'searchUpTo', message: "lies above the payload's maximum; the search ends there" }],
    });
  });

  it('must cover the band', () => {
    expect(faults(LIFT_TABLE, { searchUpTo: 'm0', searchDownTo: '3*M' })).toEqual([
      "searchUpTo: must not be below the high end of the payload's band (120 < 480)",
      'searchDownTo: must not be above the nominal payload (540 > 300)',
    ]);
    expect(faults(LIFT_TABLE, { searchUpTo: 'k', searchDownTo: '1/0' })).toEqual([
      `searchUpTo: ${BANDED}`,
      'searchDownTo: division by zero',
    ]);
  });
});

describe('rating', () => {
  const grams = {
    parameters: [{ id: 'm', unit: 'g', nominal: 300, high: 400 }, ...LIFT_TABLE.parameters.slice(1)],
  };

  it('comes from the unit of the payload, with tests under their own requirements', () => {
    const { rating } = composed(LIFT_TABLE, {
      ...grams,
      rating: {
        payload: '2*m0',
        step: 25,
        tests: [
          { name: 'dynamic', factor: 1.1 },
          { name: 'static', factor: 'M/m0', requirements: [{ measure: 'decayRate', atLeast: 0.5 }] },
        ],
      },
    });
    expect(rating).toEqual({
      payload: 0.24,
      step: 0.025,
      tests: [
        { name: 'dynamic', factor: 1.1, requirements: undefined },
        {
          name: 'static',
          factor: 1.5,
          requirements: [
            { measure: 'stability', limit: 0, law: 0 },
            { measure: 'decayRate', limit: 0.5, law: 0 },
          ],
        },
      ],
    });
  });

  it('needs positive steps and factors', () => {
    expect(
      faults(LIFT_TABLE, {
        rating: {
          payload: '-M',
          step: 'M - 180',
          tests: [{ name: 'a', factor: '0*M', requirements: [{ measure: 'decayRate', atLeast: '-1' }] }],
        },
      }),
    ).toEqual([
      'rating.payload: must not be negative',
      'rating.step: must be above 0',
      'rating.tests[0].factor: must be above 0',
      'rating.tests[0].requirements[0].atLeast: is in 1/s and must not be negative',
    ]);
  });
});

describe('map', () => {
  it('goes beyond the bands by half their width, within minimum and maximum', () => {
    expect(composed(LIFT_TABLE, { map: { x: 'm', y: 'k' } }).map).toEqual({
      x: 0,
      xFrom: 0,
      xTo: 700,
      y: 1,
      yFrom: 87500,
      yTo: 217500,
      columns: 41,
      rows: 31,
      measure: 'closest',
      others: 'nominal',
    });
  });

  it('takes an exact parameter to ± 50 % and given ranges in the unit of the parameter', () => {
    const map = {
      x: 'M',
      y: 'k',
      yFrom: 'M - 100',
      yTo: 200,
      columns: 3,
      rows: 2,
      measure: 'decayRate',
      others: 'anywhere',
    };
    expect(composed(LIFT_TABLE, { map }).map).toEqual({
      x: 4,
      xFrom: 90,
      xTo: 270,
      y: 1,
      yFrom: 80000,
      yTo: 200000,
      columns: 3,
      rows: 2,
      measure: 'decayRate',
      others: 'anywhere',
    });
  });

  it('needs ranges that are not empty', () => {
    const map = { x: 'M', xFrom: 'M', xTo: '170', y: 'zero', yTo: undefined };
    const zero = { parameters: [...LIFT_TABLE.parameters, { id: 'zero', nominal: 0 }] };
    expect(faults(LIFT_TABLE, { ...zero, map })).toEqual([
      'map.xFrom: the range of x is empty; give xFrom and xTo, the first below the second',
      'map.y: the range of y is empty; give yFrom and yTo, the first below the second',
    ]);
    expect(faults(LIFT_TABLE, { map: { x: 'm', y: 'M', xTo: 'k' } })).toEqual([`map.xTo: ${BANDED}`]);
  });
});

describe('size', () => {
  const dense = (states: number) => ({
    parameters: LIFT_TABLE.parameters,
    payload: undefined,
    actuator: undefined,
    machine: {
      states: Array.from({ length: states }, (_, i) => `x${i}`),
      descriptor: Array.from({ length: states }, (_, i) =>
        Array.from({ length: states }, (_, j) => `${i + 1}*k + ${j}*c`),
      ),
      dynamics: Array.from({ length: states }, (_, i) =>
        Array.from({ length: states }, (_, j) => `${i} - ${j}*m`),
      ),
      inputs: { u: new Array(states).fill(1) },
      outputs: { y: new Array(states).fill(1) },
    },
    control: { law: 'pid', input: 'u', output: 'y', kp: 1, ki: 1, kd: 0 },
  });

  it('refuses a dense machine of 30 states before anything is expanded', () => {
    expect(faults(LIFT_TABLE, dense(30))).toEqual([
      'machine: is too large: 30 states or more; at most 24, control and hardware included',
    ]);
  });

  it('counts control and hardware', () => {
    expect(faults(LIFT_TABLE, { ...dense(23), sensor: { lag: 0.1 } })).toEqual([
      'machine: is too large: 25 states with control and hardware; at most 24',
    ]);
  });

  it('counts signals', () => {
    const states = 14;
    const unit = (i: number) => Array.from({ length: states }, (_, j) => (i === j ? 1 : 0));
    const names = Array.from({ length: states }, (_, i) => `x${i}`);
    const machine = {
      states: names,
      dynamics: names.map((_, i) => unit(i)),
      inputs: Object.fromEntries(names.map((name, i) => [name, unit(i)])),
      outputs: Object.fromEntries(names.map((name, i) => [name, unit(i)])),
    };
    const control = names.map((name) => ({ law: 'pid', input: name, output: name, kp: 1, ki: 0, kd: 0 }));
    const changes = { machine, payload: undefined, actuator: undefined };
    expect(faults(LIFT_TABLE, { ...changes, control })).toEqual([]);
    const integrating = control.map((law, i) => (i < 4 ? { ...law, ki: 1 } : law));
    expect(faults(LIFT_TABLE, { ...changes, control: integrating })).toEqual([
      'machine: is too large: 32 signals with control and hardware; at most 31',
    ]);
  });
});
