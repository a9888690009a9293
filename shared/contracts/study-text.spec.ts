import { describe, expect, it } from 'vitest';
import { FEEDBACK, faultsOf, liftTable, spoiled, type Step } from './spoiled-study';
import { readStudy } from './study-text';

function expectFault(text: string, path: string, message: RegExp): void {
  const faults = faultsOf(text);
  expect(faults.map((fault) => fault.path)).toEqual([path]);
  expect(faults[0].message).toMatch(message);
}

describe('readStudy', () => {
  it('reads a usable study as it is written, without a warning', () => {
    const { study, warnings } = readStudy(JSON.stringify(liftTable()));
    expect(study).toEqual(liftTable());
    expect(warnings).toEqual([]);
  });

  it('reads a machine without control, inputs and outputs', () => {
    const machine = { states: ['x'], dynamics: [[-1]] };
    const free = { ...liftTable(), machine, control: undefined, actuator: undefined };
    const { study } = readStudy(JSON.stringify(free));
    expect(study.control).toBeUndefined();
    expect(study.machine).toEqual(machine);
  });

  it('reads a file that starts with a byte order mark', () => {
    expect(readStudy(`\uFEFF${JSON.stringify(liftTable())}`).study.payload).toBe('m');
  });

  it.each<[string, readonly Step[], unknown]>([
    ['a template', ['machine'], { template: 'two-mass-drive' }],
    [
      'a state feedback with an integral',
      ['control'],
      { ...FEEDBACK, integral: { output: 'carriage', gain: '3*k' } },
    ],
    [
      'a transfer function',
      ['control'],
      { law: 'transfer-function', input: 'u', output: 'drive', numerator: [0, 0, 'k'], denominator: [1, 2] },
    ],
    [
      'a state-space law',
      ['control'],
      {
        law: 'state-space',
        input: 'u',
        output: 'drive',
        A: [
          [-1, 0],
          [0, -2],
        ],
        B: [1, 1],
        C: [1, 1],
        D: 0,
      },
    ],
    [
      'a static state-space law',
      ['control'],
      { law: 'state-space', input: 'u', output: 'drive', A: [], B: [], C: [], D: 3 },
    ],
    ['a list of laws', ['control'], [liftTable().control]],
    ['a list of actuators', ['actuator'], [{ lag: 'tau', delay: 0.004, padeOrder: 3 }]],
    ['a sensor', ['sensor'], { lag: 0.002, delay: 0 }],
    ['sampling', ['sampling'], { period: 0.005 }],
    [
      'a rating',
      ['rating'],
      {
        payload: 480,
        step: 25,
        tests: [{ name: 'static', factor: 1.25, clause: '', requirements: [{ measure: 'stability' }] }],
      },
    ],
    ['definitions', ['definitions'], { J: '0.12*m*k^2', five: 5 }],
    [
      'a margin at an input',
      ['requirements'],
      [
        { measure: 'gainMargin', atLeast: 2, input: 'u' },
        { measure: 'phaseMargin', atLeast: 'pi/6' },
      ],
    ],
    ['no payload', ['searchUpTo'], 'm0*20'],
    ['a velocity output', ['machine', 'outputs', 'drive'], { velocity: [1, 0] }],
  ])('reads %s', (_, path, value) => {
    expect(faultsOf(spoiled(path, value))).toEqual([]);
  });

  it('reads a first-order machine', () => {
    const machine = {
      states: ['v', 'r'],
      dynamics: [
        [-1, 'm'],
        [0, -2],
      ],
      inputs: { u: [1, 0] },
      outputs: { drive: [1, 0] },
    };
    expect(faultsOf(spoiled(['machine'], machine))).toEqual([]);
    expectFault(
      spoiled(['machine'], { ...machine, descriptor: [[1, 0]] }),
      'machine.descriptor',
      /must have 2 rows/,
    );
  });
});

describe('a text that is no study', () => {
  it.each([
    ['empty', '', /is empty/],
    ['blank', ' \n\t', /is empty/],
    ['a word', 'hello', /line 1, column 1/],
    ['cut off', '{"format": "tareline-study",', /line 1, column 29: the text ends where a further key/],
    ['a trailing comma', '{\n  "a": [1, 2,]\n}', /line 2, column 14/],
    ['a bare NaN', '{"a": NaN}', /line 1, column 7/],
    ['two values', '{} {}', /nothing may follow/],
    ['a list', '[]', /must be an object/],
    ['null', 'null', /must be an object/],
    ['nesting of 5,000 brackets', '['.repeat(5000), /deeper than 64/],
    ['nesting of 5,000 closed brackets', `${'['.repeat(5000)}${']'.repeat(5000)}`, /deeper than 64/],
    ['over 1 MiB', JSON.stringify({ format: 'x'.repeat(1024 * 1024) }), /larger than 1 MiB/],
    ['over 1 MiB in bytes only', JSON.stringify({ format: '€'.repeat(350000) }), /larger than 1 MiB/],
  ])('%s', (_, text, message) => {
    expectFault(text, 'study', message);
  });

  it('does not count brackets inside texts', () => {
    expect(faultsOf(spoiled(['name'], `${'['.repeat(200)}"\\`))).toEqual([]);
  });

  it('refuses a key that stands twice', () => {
    const text = spoiled(['definitions'], { J: 1 }).replace('"J":1', '"J":1,"J":2');
    expectFault(text, 'definitions.J', /twice/);
  });
});

describe('names that objects inherit', () => {
  it('are refused or left out, never followed', () => {
    const text = spoiled(['definitions'], { J: 1 }).replace('"J"', '"__proto__"');
    expect(readStudy(text).warnings.map(({ path }) => path)).toEqual(['definitions.__proto__']);
    expectFault(spoiled(['payload'], 'constructor'), 'payload', /unknown parameter/);
    expectFault(
      spoiled(['requirements', 0, 'measure'], '__proto__'),
      'requirements[0].measure',
      /is not known/,
    );
    expectFault(spoiled(['control', 'law'], 'toString'), 'control.law', /is not known/);
  });
});

describe('warnings', () => {
  it.each<[string, readonly Step[], unknown, string, RegExp]>([
    ['an unknown key of a law', ['control', 'kpp'], 1, 'control.kpp', /^unknown key, ignored$/],
    ['an unknown key of the study', ['comment'], 'x', 'comment', /unknown key/],
    ['an unknown key that reads badly', ['my note'], 'x', '["my note"]', /unknown key/],
    ['an unknown key in a list', ['parameters', 4, 'max'], 1, 'parameters[4].max', /unknown key/],
    ['an input on a pole measure', ['requirements', 1, 'input'], 'u', 'requirements[1].input', /unknown key/],
    [
      'an unknown unit',
      ['parameters', 4, 'unit'],
      'stone',
      'parameters[4].unit',
      /unknown unit "stone", taken as a label/,
    ],
    ['a one-sided band', ['parameters', 4, 'low'], 170, 'parameters[4].high', /the band ends at the nominal/],
  ])('%s', (_, path, value, at, message) => {
    const { warnings } = readStudy(spoiled(path, value));
    expect(warnings.map((warning) => warning.path)).toEqual([at]);
    expect(warnings[0].message).toMatch(message);
  });

  it('tells what has no effect without a payload', () => {
    const { warnings } = readStudy(spoiled(['payload'], undefined));
    expect(warnings.map(({ path }) => path)).toEqual(['searchUpTo', 'searchDownTo']);
  });

  it('leaves unknown keys out of the study', () => {
    expect(readStudy(spoiled(['comment'], 'x')).study).toEqual(liftTable());
  });
});
