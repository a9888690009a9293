import type { ComposedLaw, ComposedLoop } from '../composed';
import { add, type Complex, complex, divide, multiply, polynomialAt, solveComplex } from './complex';
import { type WrittenHardware, type WrittenMachine, writtenLoop } from './written-loop';

/** A loop with one law and the gain L(s) of that loop, computed apart from any polynomial matrix. */
export interface SampleLoop {
  readonly loop: ComposedLoop;
  readonly loopGain: (s: Complex) => Complex;
}

type Numbers = readonly number[];

interface Hardware {
  readonly lag: number;
  readonly delay: number;
}

export const SAMPLE_LAWS = [
  'pid',
  'pid-unfiltered',
  'state-feedback',
  'transfer-function',
  'state-space',
] as const;
export type SampleLaw = (typeof SAMPLE_LAWS)[number];

/** Two masses with springs, dampers and couplings drawn at random, or three first-order states. */
interface SampleMachine {
  readonly order: 1 | 2;
  readonly coefficients: readonly (readonly Numbers[])[];
  readonly input: Numbers;
  readonly position: Numbers;
  readonly velocity: Numbers;
}

function randomMachine(random: () => number, order: 1 | 2): SampleMachine {
  const between = (low: number, high: number): number => low + (high - low) * random();
  if (order === 2) {
    const coupling = between(-0.3, 0.3);
    return {
      order,
      coefficients: [
        [
          [between(5, 60), between(-9, 9)],
          [between(-9, 9), between(-5, 40)],
        ],
        [
          [between(0.1, 2), between(-0.5, 0.5)],
          [between(-0.5, 0.5), between(0.1, 2)],
        ],
        [
          [between(1, 3), coupling],
          [coupling, between(0.5, 2)],
        ],
      ],
      input: [between(0.5, 2), between(-1, 1)],
      position: [between(-1, 1), between(0.5, 2)],
      velocity: [between(-0.2, 0.2), 0],
    };
  }
  const square = (diagonal: number): Numbers[] =>
    [0, 1, 2].map((i) => [0, 1, 2].map((j) => between(-0.5, 0.5) + (i === j ? diagonal : 0)));
  return {
    order,
    coefficients: [square(1.5), square(2)],
    input: [between(0.5, 2), 0, between(-1, 1)],
    position: [between(-1, 1), between(0.5, 2), 0],
    velocity: [],
  };
}

/** Σ_k coefficients[k] s^k x = input, solved for x. */
function response({ coefficients, input }: SampleMachine, s: Complex): Complex[] {
  const matrix = input.map((_, i) =>
    input.map((__, j) =>
      polynomialAt(
        coefficients.map((power) => power[i][j]),
        s,
      ),
    ),
  );
  return solveComplex(
    matrix,
    input.map((value) => complex(value)),
  );
}

/** lag and delay in Padé form of order 2 (12 ∓ 6x + x²). */
function hardwareGain({ lag, delay }: Hardware, s: Complex): Complex {
  const x = multiply(s, complex(delay));
  const pade = divide(polynomialAt([12, -6, 1], x), polynomialAt([12, 6, 1], x));
  return divide(pade, polynomialAt([1, lag], s));
}

function dot(weights: Numbers, values: readonly Complex[]): Complex {
  return weights.reduce((sum, weight, i) => add(sum, multiply(complex(weight), values[i])), complex(0));
}

/** Draws a loop; actuator, sensor and sampling are drawn too, each part present in half of the loops. */
export function sampleLoop(random: () => number, kind: SampleLaw, order: 1 | 2): SampleLoop {
  const between = (low: number, high: number): number => low + (high - low) * random();
  const sometimes = (value: number): number => (random() < 0.5 ? value : 0);
  const machine = randomMachine(random, order);
  const actuator = { lag: sometimes(between(0.01, 0.2)), delay: sometimes(between(0.01, 0.2)) };
  const sensor = { lag: sometimes(between(0.01, 0.2)), delay: sometimes(between(0.01, 0.1)) };
  const sampling = { lag: 0, delay: sometimes(between(0.01, 0.1)) };
  const output = (s: Complex): Complex => {
    const x = response(machine, s);
    return add(dot(machine.position, x), multiply(s, dot(machine.velocity, x)));
  };
  const path = (s: Complex): Complex =>
    [actuator, sensor, sampling].reduce((gain, part) => multiply(gain, hardwareGain(part, s)), complex(1));
  const gains = Array.from({ length: 4 }, () => between(0.5, 4));
  const dynamics = [
    [-between(1, 5), between(-1, 1)],
    [between(-1, 1), -between(1, 5)],
  ];
  let law: (write: (value: number) => number) => ComposedLaw;
  let gain: (s: Complex) => Complex;
  switch (kind) {
    case 'pid':
    case 'pid-unfiltered': {
      const [kp, ki, kd] = [gains[0], sometimes(gains[1]), sometimes(gains[2])];
      const derivativeTime = kind === 'pid' ? between(0.01, 0.1) : 0;
      law = (write) => ({
        law: 'pid',
        input: 'u',
        output: 'y',
        kp: write(kp),
        ki: write(ki),
        kd: write(kd),
        derivativeTime: write(derivativeTime),
      });
      gain = (s) => {
        const derivative = divide(multiply(complex(kd), s), polynomialAt([1, derivativeTime], s));
        const controller = add(add(complex(kp), divide(complex(ki), s)), derivative);
        return multiply(multiply(controller, output(s)), path(s));
      };
      break;
    }
    case 'state-feedback': {
      const integral = sometimes(gains[3]);
      law = (write) => ({
        law: 'state-feedback',
        input: 'u',
        gains: [
          { unknown: 0, dots: 0, gain: write(gains[0]) },
          { unknown: 1, dots: order === 2 ? 1 : 0, gain: write(gains[1]) },
        ],
        integral: { output: 'y', gain: write(integral) },
      });
      gain = (s) => {
        const x = response(machine, s);
        const second = order === 2 ? multiply(s, x[1]) : x[1];
        const states = add(multiply(complex(gains[0]), x[0]), multiply(complex(gains[1]), second));
        return multiply(add(states, divide(multiply(complex(integral), output(s)), s)), path(s));
      };
      break;
    }
    case 'transfer-function': {
      const numerator = gains.slice(0, 3);
      const denominator = [between(1, 9), between(1, 5), between(0.2, 1)];
      law = (write) => ({
        law: 'transfer-function',
        input: 'u',
        output: 'y',
        numerator: numerator.map(write),
        denominator: denominator.map(write),
      });
      gain = (s) =>
        multiply(
          multiply(divide(polynomialAt(numerator, s), polynomialAt(denominator, s)), output(s)),
          path(s),
        );
      break;
    }
    case 'state-space': {
      const [b, c, d] = [gains.slice(0, 2), gains.slice(2, 4), sometimes(0.7)];
      law = (write) => ({
        law: 'state-space',
        input: 'u',
        output: 'y',
        a: dynamics.map((row) => row.map(write)),
        b: b.map(write),
        c: c.map(write),
        d: write(d),
      });
      gain = (s) => {
        const matrix = dynamics.map((row, i) =>
          row.map((value, j) => (i === j ? add(s, complex(-value)) : complex(-value))),
        );
        const states = solveComplex(
          matrix,
          b.map((value) => complex(value)),
        );
        return multiply(multiply(add(dot(c, states), complex(d)), output(s)), path(s));
      };
    }
  }
  const text = (value: number): string => String(value);
  const row = (values: Numbers): string[] => values.map(text);
  const written: WrittenMachine = {
    order,
    coefficients: machine.coefficients.map((matrix) => matrix.map(row)),
    inputs: { u: row(machine.input) },
    outputs: { y: { position: row(machine.position), velocity: row(machine.velocity) } },
  };
  const part = ({ lag, delay }: Hardware): WrittenHardware => ({
    lag: text(lag),
    delay: text(delay),
    padeOrder: 2,
  });
  const loop = writtenLoop(written, (write) => [law((value) => write(text(value)))], {
    actuator: part(actuator),
    sensor: part(sensor),
    sampling: part(sampling),
  });
  return { loop, loopGain: gain };
}
