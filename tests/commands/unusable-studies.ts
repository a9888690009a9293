import { exampleStudy } from './support/example-studies';

/** A study that cannot be used. */
export interface UnusableStudy {
  readonly text: string;
  /** JSON paths of its faults, in any order. */
  readonly paths: readonly string[];
  /** What one of the lines says. */
  readonly says: RegExp;
  /** Tried with the command in a process of its own too. */
  readonly alone?: true;
}

type Step = string | number;

const liftTable = () => exampleStudy('lift-table-long-column');

/** The lift table's study with the value at a path replaced; undefined removes it. */
function changed(...changes: readonly (readonly [path: readonly Step[], value: unknown])[]): string {
  const study: unknown = liftTable();
  for (const [path, value] of changes) put(study, path, value);
  return JSON.stringify(study);
}

function put(root: unknown, path: readonly Step[], value: unknown): void {
  let at = root as Record<Step, unknown>;
  for (const step of path.slice(0, -1)) at = at[step] as Record<Step, unknown>;
  const last = path[path.length - 1];
  if (value === undefined) Reflect.deleteProperty(at, last);
  else at[last] = value;
}

/** A mass, damping or stiffness matrix with an entry everywhere. */
function denseMachine(order: number): object {
  const matrix = (name: string) =>
    Array.from({ length: order }, (_, i) =>
      Array.from({ length: order }, (_, j) => `${i === j ? 10 : 1} + ${name}/${1 + i + j}`),
    );
  const column = Array.from({ length: order }, (_, i) => (i === 0 ? 1 : 0));
  return {
    coordinates: column.map((_, i) => `q${i}`),
    mass: matrix('m'),
    damping: matrix('c'),
    stiffness: matrix('k'),
    inputs: { u: column },
    outputs: { drive: { position: column } },
  };
}

const M = 'machine';
const K = 1;
const TAU = 3;

export const unusableStudies: Readonly<Record<string, UnusableStudy>> = {
  'not JSON': { text: '{ "format": "tareline-study", }', paths: ['study'], says: /line 1/, alone: true },
  empty: { text: '', paths: ['study'], says: /empty/, alone: true },
  'white space alone': { text: ' \n\t ', paths: ['study'], says: /empty/ },
  'a list': { text: '[]', paths: ['study'], says: /object/ },
  'a wrong format': {
    text: changed([['format'], 'tareline-result']),
    paths: ['format'],
    says: /"tareline-study"/,
    alone: true,
  },
  'a wrong version': { text: changed([['version'], 2]), paths: ['version'], says: /must be 1/ },
  'low above nominal': {
    text: changed([['parameters', K, 'low'], 160000]),
    paths: ['parameters[1].low'],
    says: /must not be above nominal \(160000 > 150000\)/,
    alone: true,
  },
  'high below nominal': {
    text: changed([['parameters', K, 'nominal'], 190000]),
    paths: ['parameters[1].high'],
    says: /must not be below nominal \(185000 < 190000\)/,
  },
  'an unknown id in an entry': {
    text: changed([[M, 'stiffness', 0, 1], '-kk']),
    paths: ['machine.stiffness[0][1]'],
    says: /kk/,
    alone: true,
  },
  'a ragged matrix': {
    text: changed([[M, 'mass', 1], ['0']]),
    paths: ['machine.mass[1]'],
    says: /must have 2 entries/,
    alone: true,
  },
  'a call to the process in an expression': {
    text: changed([['control', 'kp'], 'process.exit(7)']),
    paths: ['control.kp'],
    says: /column/,
    alone: true,
  },
  'an inherited name in an expression': {
    text: changed([['control', 'kp'], 'constructor']),
    paths: ['control.kp'],
    says: /constructor/,
    alone: true,
  },
  'an inherited name called': {
    text: changed([[M, 'mass', 0, 0], 'constructor("return this")()']),
    paths: ['machine.mass[0][0]'],
    says: /has no meaning here/,
  },
  'a prototype as an id': {
    text: changed([[M, 'damping', 0, 0], '__proto__']),
    paths: ['machine.damping[0][0]'],
    says: /"_" has no meaning here/,
  },
  'a division by zero inside the bands': {
    text: changed([[M, 'damping', 1, 1], 'c/(k - 130000)']),
    paths: ['machine.damping[1][1]'],
    says: /k = 130000/,
    alone: true,
  },
  'a division by zero everywhere': {
    text: changed([['control', 'kd'], '1/(M - 180)']),
    paths: ['control.kd'],
    says: /zero/,
  },
  'the root of a negative inside the bands': {
    text: changed([[M, 'stiffness', 0, 0], 'sqrt(k - 125000)']),
    paths: ['machine.stiffness[0][0]'],
    says: /k = 12\d{4}/,
    alone: true,
  },
  'the logarithm of a negative inside the bands': {
    text: changed([[M, 'damping', 0, 0], 'log(c - 500)']),
    paths: ['machine.damping[0][0]'],
    says: /c = 4\d\d/,
  },
  'a mass matrix that is singular inside the bands': {
    text: changed([[M, 'mass', 1, 1], 'm - 200']),
    paths: ['machine.mass'],
    says: /m = 200/,
    alone: true,
  },
  'no requirement': {
    text: changed([['requirements'], []]),
    paths: ['requirements'],
    says: /at least one requirement/,
    alone: true,
  },
  'an unknown requirement': {
    text: changed([['requirements', 1], { measure: 'comfort', atLeast: 1 }]),
    paths: ['requirements[1].measure'],
    says: /"comfort"/,
  },
  'an id twice': {
    text: changed([['parameters', 4, 'id'], 'k']),
    paths: ['parameters[4].id'],
    says: /"k" is used twice/,
    alone: true,
  },
  'an unknown payload': { text: changed([['payload'], 'load']), paths: ['payload'], says: /"load"/ },
  'an unknown state': {
    text: changed([['control'], { law: 'state-feedback', input: 'u', gains: { "q9'": 1 } }]),
    paths: ["control.gains.q9'"],
    says: /unknown state "q9'"/,
    alone: true,
  },
  'an unknown input': { text: changed([['control', 'input'], 'f']), paths: ['control.input'], says: /"f"/ },
  'an unknown output': {
    text: changed([['control', 'output'], 'belt']),
    paths: ['control.output'],
    says: /"belt"/,
  },
  null: {
    text: changed([['control', 'ki'], null]),
    paths: ['control.ki'],
    says: /must be a number or an expression, not null/,
    alone: true,
  },
  'a number beyond all doubles': {
    text: changed([['control', 'kp'], 7777]).replace('7777', '1e999'),
    paths: ['control.kp'],
    says: /finite/,
    alone: true,
  },
  'a number beyond all doubles in an expression': {
    text: changed([['control', 'kp'], '1e999']),
    paths: ['control.kp'],
    says: /1e999 is too large/,
  },
  'an expression over 2,000 characters': {
    text: changed([['control', 'kp'], `9400${'+0'.repeat(1000)}`]),
    paths: ['control.kp'],
    says: /2000 characters/,
  },
  'an expression of brackets alone': {
    text: changed([['control', 'kp'], `${'('.repeat(999)}1${')'.repeat(999)}`]),
    paths: ['control.kp'],
    says: /nested deeper than 64 levels/,
  },
  'nesting of 5,000 brackets': {
    text: changed([[M, 'mass'], 'HERE']).replace('"HERE"', '['.repeat(5000) + ']'.repeat(5000)),
    paths: ['study'],
    says: /must not nest deeper than 64/,
    alone: true,
  },
  '5,000 brackets that are never closed': {
    text: '['.repeat(5000),
    paths: ['study'],
    says: /must not nest deeper than 64/,
  },
  'a file over 1 MiB': {
    text: JSON.stringify({ ...liftTable(), name: 'x'.repeat(1024 * 1024) }),
    paths: ['study'],
    says: /1 MiB/,
    alone: true,
  },
  'a negative lag': {
    text: changed([['actuator', 'lag'], -0.008]),
    paths: ['actuator.lag'],
    says: /must not be negative/,
  },
  'a lag that turns negative inside its band': {
    text: changed([['parameters', TAU, 'minimum'], undefined], [['parameters', TAU, 'low'], -0.001]),
    paths: ['actuator.lag'],
    says: /tau = -0\.001/,
  },
  'a toleranced lag from 0': {
    text: changed([['parameters', TAU, 'minimum'], 0], [['parameters', TAU, 'low'], 0]),
    paths: ['actuator.lag'],
    says: /low end above 0/,
    alone: true,
  },
  'a dense machine of 30 states': {
    text: changed([['machine'], denseMachine(15)]),
    paths: ['machine'],
    says: /24/,
    alone: true,
  },
  'a phase margin given in degrees': {
    text: changed([['requirements', 2], { measure: 'phaseMargin', atLeast: 45 }]),
    paths: ['requirements[2].atLeast'],
    says: /rad.+45 degrees are 0\.7854/,
    alone: true,
  },
  'a cycle in definitions': {
    text: changed([['definitions'], { a: 'b + 1', b: 'a' }]),
    paths: ['definitions.a'],
    says: /depends on itself: a → b → a/,
  },
  'a definition that is a parameter': {
    text: changed([['definitions'], { k: '2' }]),
    paths: ['definitions.k'],
    says: /parameter/,
  },
  'a level that uses a toleranced parameter': {
    text: changed([['requirements', 1, 'atLeast'], 'tau']),
    paths: ['requirements[1].atLeast'],
    says: /"tau" has a band/,
  },
  'a search that ends inside the band': {
    text: changed([['searchUpTo'], 479]),
    paths: ['searchUpTo'],
    says: /479 < 480/,
  },
  'a template without one of its parameters': {
    text: changed([['machine'], { template: 'two-mass-drive' }]),
    paths: ['parameters'],
    says: /two-mass-drive needs b /,
  },
  'several faults at once': {
    text: changed(
      [['control', 'kp'], null],
      [['parameters', K, 'low'], true],
      [['requirements', 2, 'atLeast'], {}],
    ),
    paths: ['control.kp', 'parameters[1].low', 'requirements[2].atLeast'],
    says: /control\.kp: must be a number or an expression, not null/,
    alone: true,
  },
};
