import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { FEEDBACK, faultsOf, liftTable, spoiled, type Step } from './spoiled-study';

function expectFault(text: string, path: string, message: RegExp): void {
  const faults = faultsOf(text);
  expect(faults.map((fault) => fault.path)).toEqual([path]);
  expect(faults[0].message).toMatch(message);
}

describe('an unusable study', () => {
  const M = 'machine';
  it.each<[string, readonly Step[], unknown, string, RegExp]>([
    ['wrong format', ['format'], 'other', 'format', /must be "tareline-study"/],
    ['no format', ['format'], undefined, 'format', /must be "tareline-study"/],
    ['wrong version', ['version'], 2, 'version', /must be 1/],
    ['version as a text', ['version'], '1', 'version', /must be 1/],
    [
      'low above nominal',
      ['parameters', 0, 'low'],
      310,
      'parameters[0].low',
      /must not be above nominal \(310 > 300\)/,
    ],
    [
      'nominal above high',
      ['parameters', 1, 'high'],
      140000,
      'parameters[1].high',
      /must not be below nominal/,
    ],
    [
      'minimum above low',
      ['parameters', 2, 'minimum'],
      500,
      'parameters[2].minimum',
      /must not be above low/,
    ],
    [
      'a ragged matrix',
      [M, 'mass', 0],
      ['M'],
      'machine.mass[0]',
      /must have 2 entries, one per coordinate, not 1/,
    ],
    [
      'too many rows',
      [M, 'damping'],
      [
        ['c', 0],
        [0, 'c'],
        [0, 0],
      ],
      'machine.damping',
      /must have 2 rows, one per coordinate, not 3/,
    ],
    ['an input of a wrong size', [M, 'inputs', 'u'], [1], 'machine.inputs.u', /must have 2 entries/],
    [
      'an output of a wrong size',
      [M, 'outputs', 'drive'],
      { position: [1, 0, 0] },
      'machine.outputs.drive.position',
      /must have 2 entries/,
    ],
    ['a matrix that is a number', [M, 'mass'], 3, 'machine.mass', /must be a matrix/],
    ['no mass', [M, 'mass'], undefined, 'machine.mass', /is missing; give a matrix/],
    [
      'an output of nothing',
      [M, 'outputs', 'drive'],
      {},
      'machine.outputs.drive',
      /must have "position" or "velocity"/,
    ],
    ['no requirement', ['requirements'], [], 'requirements', /^must list at least one requirement$/],
    [
      'requirements left out',
      ['requirements'],
      undefined,
      'requirements',
      /is missing; give a list of requirements/,
    ],
    [
      'an unknown requirement',
      ['requirements', 0],
      { measure: 'speed' },
      'requirements[0].measure',
      /"speed" is not known; must be one of stability, decayRate/,
    ],
    [
      'a requirement without measure',
      ['requirements', 0],
      {},
      'requirements[0].measure',
      /is missing; give one of stability/,
    ],
    [
      'a requirement that is a text',
      ['requirements', 0],
      'stability',
      'requirements[0]',
      /must be a requirement such as/,
    ],
    [
      'a level left out',
      ['requirements', 1],
      { measure: 'decayRate' },
      'requirements[1].atLeast',
      /is missing; give a number/,
    ],
    ['an id twice', ['parameters', 5, 'id'], 'M', 'parameters[5].id', /"M" is used twice/],
    [
      'a definition that is a parameter',
      ['definitions'],
      { k: 1 },
      'definitions.k',
      /"k" is also a parameter/,
    ],
    ['a reserved id', ['parameters', 5, 'id'], 'pi', 'parameters[5].id', /meaning of its own/],
    ['a reserved definition', ['definitions'], { g0: 1 }, 'definitions.g0', /meaning of its own/],
    ['an id that is no name', ['parameters', 5, 'id'], 'm 0', 'parameters[5].id', /"m 0" is not a name/],
    ['a coordinate twice', [M, 'coordinates'], ['q1', 'q1'], 'machine.coordinates[1]', /"q1" is used twice/],
    ['no coordinate', [M, 'coordinates'], [], 'machine.coordinates', /must name at least one coordinate/],
    ['an unknown payload', ['payload'], 'load', 'payload', /unknown parameter "load"; the study has m, k, c/],
    ['a payload that is a number', ['payload'], 3, 'payload', /must be a name/],
    [
      'an unknown state',
      ['control'],
      { ...FEEDBACK, gains: { q3: 1 } },
      'control.gains.q3',
      /unknown state "q3"; the machine has q1, q2, q1', q2'/,
    ],
    [
      'an inherited name as a state',
      ['control'],
      { ...FEEDBACK, gains: { constructor: 1 } },
      'control.gains.constructor',
      /unknown state/,
    ],
    ['an unknown input', ['control', 'input'], 'v', 'control.input', /unknown input "v"; the machine has u/],
    [
      'an unknown output',
      ['control', 'output'],
      'constructor',
      'control.output',
      /unknown output "constructor"; the machine has drive, carriage/,
    ],
    [
      'an unknown output of an integral',
      ['control'],
      { ...FEEDBACK, integral: { output: 'x', gain: 1 } },
      'control.integral.output',
      /unknown output/,
    ],
    [
      'an unknown input of a margin',
      ['requirements', 2],
      { measure: 'modulusMargin', atLeast: 0.5, input: 'v' },
      'requirements[2].input',
      /unknown input "v"/,
    ],
    [
      'two laws for one input',
      ['control'],
      [liftTable().control, liftTable().control],
      'control[1].input',
      /has a law already/,
    ],
    [
      'an unknown law',
      ['control', 'law'],
      'pdi',
      'control.law',
      /"pdi" is not known; must be one of pid, state-feedback/,
    ],
    ['an unknown law in a list', ['control'], [{ law: 'pdi' }], 'control[0].law', /"pdi" is not known/],
    ['no law', ['control'], [], 'control', /must list at least one law/],
    ['control that is a text', ['control'], 'pid', 'control', /must be a law or a list of laws/],
    [
      'a gain left out',
      ['control', 'kd'],
      undefined,
      'control.kd',
      /^is missing; give a number or an expression \(0 for none\)$/,
    ],
    ['a gain that is a list', ['control', 'kp'], [1], 'control.kp', /^must be a number or an expression$/],
    [
      'a gain that is null',
      ['control', 'kp'],
      null,
      'control.kp',
      /^must be a number or an expression, not null$/,
    ],
    ['a gain that is true', ['control', 'kp'], true, 'control.kp', /^must be a number or an expression$/],
    ['an empty expression', ['control', 'kp'], '  ', 'control.kp', /not an empty text/],
    [
      'an expression over 2,000 characters',
      ['control', 'kp'],
      `1${'+1'.repeat(1000)}`,
      'control.kp',
      /at most 2000 characters/,
    ],
    [
      'an entry that is null',
      [M, 'mass', 0, 1],
      null,
      'machine.mass[0][1]',
      /must be a number or an expression, not null/,
    ],
    ['a nominal left out', ['parameters', 4], { id: 'M' }, 'parameters[4].nominal', /is missing/],
    [
      'a parameter that is a text',
      ['parameters', 4],
      'M',
      'parameters[4]',
      /must be a parameter with id and nominal/,
    ],
    [
      'an unknown kind',
      ['parameters', 0, 'kind'],
      'load',
      'parameters[0].kind',
      /"load" is not known; must be one of tolerance, use, wear/,
    ],
    ['a search that ends in the band', ['searchUpTo'], 400, 'searchUpTo', /400 < 480/],
    [
      'a search downwards from above',
      ['searchDownTo'],
      301,
      'searchDownTo',
      /must not be above the nominal payload/,
    ],
    ['a negative lag', ['actuator', 'lag'], -0.001, 'actuator.lag', /must not be negative/],
    ['a negative sensor delay', ['sensor'], { delay: -1 }, 'sensor.delay', /must not be negative/],
    [
      'a negative derivative time',
      ['control', 'derivativeTime'],
      -1,
      'control.derivativeTime',
      /must not be negative/,
    ],
    ['a sampling period of 0', ['sampling'], { period: 0 }, 'sampling.period', /must be above 0/],
    [
      'a Padé order of 7',
      ['actuator', 'padeOrder'],
      7,
      'actuator.padeOrder',
      /must be an integer from 1 to 6/,
    ],
    [
      'a Padé order of 1.5',
      ['actuator', 'padeOrder'],
      1.5,
      'actuator.padeOrder',
      /must be an integer from 1 to 6/,
    ],
    ['more actuators than laws', ['actuator'], [{}, {}], 'actuator', /one per law, not 2/],
    [
      'a phase margin in degrees',
      ['requirements', 2],
      { measure: 'phaseMargin', atLeast: 45 },
      'requirements[2].atLeast',
      /^is in rad and must be below π; 45 degrees are 0\.7854$/,
    ],
    ['a damping ratio of 1', ['requirements', 1, 'atLeast'], 1, 'requirements[1].atLeast', /below 1/],
    ['a modulus margin of 0', ['requirements', 2, 'atLeast'], 0, 'requirements[2].atLeast', /above 0/],
    [
      'a gain margin in dB',
      ['requirements', 2],
      { measure: 'gainMargin', atLeast: 0.5 },
      'requirements[2].atLeast',
      /at least 1/,
    ],
    [
      'a negative decay rate',
      ['requirements', 2],
      { measure: 'decayRate', atLeast: -1 },
      'requirements[2].atLeast',
      /negative/,
    ],
    [
      'an unknown template',
      [M],
      { template: 'crane' },
      'machine.template',
      /"crane" is not known; must be one of mass-spring-damper/,
    ],
    ['no machine', [M], undefined, 'machine', /is missing; give a machine with "template"/],
    ['a machine in no form', [M], {}, 'machine', /must have "template", or "coordinates"/],
    [
      'a machine in two forms',
      [M, 'template'],
      'two-mass-drive',
      'machine',
      /has "template" and "coordinates"/,
    ],
    ['a machine that is null', [M], null, 'machine', /must be a machine with/],
    ['an unknown map axis', ['map', 'x'], 'z', 'map.x', /unknown parameter "z"/],
    ['a map of one parameter', ['map', 'y'], 'm', 'map.y', /must differ from x/],
    ['a map of one column', ['map', 'columns'], 1, 'map.columns', /must be an integer from 2 to 501/],
    ['a map of 502 rows', ['map', 'rows'], 502, 'map.rows', /must be an integer from 2 to 501/],
    ['a map that runs backwards', ['map', 'xFrom'], 900, 'map.xFrom', /must be below xTo/],
    ['an unknown map measure', ['map', 'measure'], 'stability', 'map.measure', /must be one of decayRate/],
    [
      'unknown others',
      ['map', 'others'],
      'low',
      'map.others',
      /"low" is not known; must be one of nominal, anywhere/,
    ],
    ['a rating step of 0', ['rating'], { payload: 1, step: 0, tests: [] }, 'rating.step', /above 0/],
    [
      'a test without factor',
      ['rating'],
      { payload: 1, step: 1, tests: [{ name: 'a' }] },
      'rating.tests[0].factor',
      /is missing/,
    ],
    [
      'a test with a wrong level',
      ['rating'],
      { tests: [{ name: 'a', factor: 1, requirements: [{ measure: 'gainMargin', atLeast: 0 }] }] },
      'rating.tests[0].requirements[0].atLeast',
      /at least 1/,
    ],
    [
      'an improper transfer function',
      ['control'],
      { law: 'transfer-function', input: 'u', output: 'drive', numerator: [1, 0], denominator: [0, 1] },
      'control.numerator',
      /higher degree/,
    ],
    [
      'a denominator of zeros',
      ['control'],
      { law: 'transfer-function', input: 'u', output: 'drive', numerator: [1], denominator: [0, 0] },
      'control.denominator',
      /must not be zero/,
    ],
    [
      'no coefficient',
      ['control'],
      { law: 'transfer-function', input: 'u', output: 'drive', numerator: [], denominator: [1] },
      'control.numerator',
      /at least one coefficient/,
    ],
    [
      'a ragged law',
      ['control'],
      { law: 'state-space', input: 'u', output: 'drive', A: [[1, 2]], B: [1], C: [1], D: 0 },
      'control.A[0]',
      /must have 1 entry, one per state of the law, not 2/,
    ],
    ['definitions in a list', ['definitions'], [], 'definitions', /must be an object of names/],
  ])('%s', (_, path, value, at, message) => {
    expectFault(spoiled(path, value), at, message);
  });

  it('a number too large for a double', () => {
    expectFault(spoiled(['control', 'kp'], 7777).replace('7777', '1e999'), 'control.kp', /^must be finite$/);
    expectFault(
      spoiled(['parameters', 3, 'nominal'], 7777).replace('7777', '-1e999'),
      'parameters[3].nominal',
      /finite/,
    );
  });

  it('tells several faults together', () => {
    const study = liftTable();
    const text = JSON.stringify({
      ...study,
      requirements: [],
      control: { ...study.control, kp: null },
      payload: 5,
    });
    expect(
      faultsOf(text)
        .map(({ path }) => path)
        .sort(),
    ).toEqual(['control.kp', 'payload', 'requirements']);
    const unknown = JSON.stringify({
      ...study,
      payload: 'x',
      searchUpTo: 1,
      control: { ...study.control, input: 'y' },
    });
    expect(
      faultsOf(unknown)
        .map(({ path }) => path)
        .sort(),
    ).toEqual(['control.input', 'payload']);
  });

  it('tells the other faults when the machine has no form', () => {
    const text = JSON.stringify({ ...liftTable(), machine: {}, requirements: [] });
    expect(faultsOf(text).map(({ path }) => path)).toEqual(['machine', 'requirements']);
  });

  it('counts faults beyond the hundredth', () => {
    const faults = faultsOf(spoiled(['parameters'], Array(500).fill(null)));
    expect(faults).toHaveLength(101);
    expect(faults[100]).toEqual({ path: 'study', message: 'has 400 more faults' });
  });

  it('refuses more values than can be judged', () => {
    expectFault(spoiled(['machine', 'mass'], [Array(200_000).fill(null)]), 'study', /more than 50000 values/);
    expect(faultsOf(spoiled(['machine', 'mass'], [Array(49_000).fill(null)]))).toHaveLength(101);
  });

  it('gives each fault one line, in words of the trade, whatever is spoiled', () => {
    const study = liftTable();
    const paths: Step[][] = [];
    const collect = (value: unknown, path: Step[]) => {
      if (path.length > 0) paths.push(path);
      if (Array.isArray(value)) value.forEach((entry, index) => collect(entry, [...path, index]));
      else if (typeof value === 'object' && value !== null) {
        for (const [key, entry] of Object.entries(value)) collect(entry, [...path, key]);
      }
    };
    collect(study, []);
    fc.assert(
      fc.property(
        fc.constantFrom(...paths),
        fc.oneof(fc.jsonValue({ maxDepth: 3 }), fc.constant(undefined)),
        (path, value) => {
          for (const { path: at, message } of faultsOf(spoiled(path, value))) {
            expect(at).not.toBe('');
            expect(`${at}: ${message}`).not.toMatch(/\n|Invalid|expected|received|undefined|Too (small|big)/);
          }
        },
      ),
      { numRuns: 2000 },
    );
  });
});
