import { describe, expect, it } from 'vitest';
import { ExactEvaluator } from '../../expressions';
import { Fraction, ONE, ZERO } from '../../expressions/testing/fraction';
import { evaluateExactly } from '../polynomial/exact-point';
import { expandLoop, type LoopPolynomial } from '../polynomial/loop-polynomial';
import { loopAt } from '../polynomial/testing/loop-at';
import { seededRandom } from '../polynomial/testing/random';
import { buildLoop } from './build-loop';
import type { ComposedLoop, ComposedPid } from './composed';
import type { LoopMatrix } from './loop-matrix';
import { NominalValues } from './nominal-values';
import { add, complex, divide, modulus, multiply, polynomialAt } from './testing/complex';
import { SAMPLE_LAWS, sampleLoop } from './testing/sample-loops';
import { MASS, type Write, writtenLoop } from './testing/written-loop';

function build(
  composed: ComposedLoop,
  parameters: readonly number[] = [],
  varying: readonly number[] = [],
): LoopMatrix {
  const constants = new NominalValues(composed.program, parameters, (parameter) =>
    varying.includes(parameter),
  );
  return buildLoop(composed, (node) => constants.constant(node));
}

function expand(
  loop: LoopMatrix,
  parameters: readonly number[],
  variables: readonly number[],
  law: number,
): LoopPolynomial {
  const polynomial = expandLoop(loop, new ExactEvaluator(loop.program, parameters, variables), law);
  if (polynomial === undefined) throw new Error('not rational');
  return polynomial;
}

function pid(write: Write, kp: string, ki: string, kd: string, derivativeTime = '0'): ComposedPid {
  return {
    law: 'pid',
    input: 'u',
    output: 'y',
    kp: write(kp),
    ki: write(ki),
    kd: write(kd),
    derivativeTime: write(derivativeTime),
  };
}

describe('PID on a mass', () => {
  // p0 … p5: m, c, k, kp, ki, kd
  const composed = writtenLoop(MASS, (write) => [pid(write, 'p3', 'p4', 'p5')]);
  const loop = build(composed, [1, 1, 1, 1, 1, 1], [0, 1, 2, 3, 4, 5]);

  it('has the characteristic polynomial m s³ + (c + kd) s² + (k + kp) s + ki, and s (m s² + c s + k) broken', () => {
    expect(loop.order).toBe(3);
    const polynomial = expand(loop, new Array<number>(6).fill(0), [0, 1, 2, 3, 4, 5], 0);
    const random = seededRandom(71);
    const place = (): Fraction => new Fraction(BigInt(Math.floor(random() * 60) - 29), 7n);
    let sign: Fraction | undefined;
    for (let trial = 0; trial < 30; trial++) {
      const s = place();
      const point = [0, 1, 2, 3, 4, 5].map(place);
      const [m, c, k, kp, ki, kd] = point;
      const broken = m
        .multiply(s.power(3))
        .add(c.multiply(s.power(2)))
        .add(k.multiply(s));
      const closed = broken
        .add(kd.multiply(s.power(2)))
        .add(kp.multiply(s))
        .add(ki);
      const value = loopAt(polynomial, s, ONE, point);
      sign ??= value.isZero ? undefined : value.divide(closed);
      if (sign === undefined) continue;
      expect(sign.abs().compare(ONE)).toBe(0);
      expect(value.compare(closed.multiply(sign))).toBe(0);
      expect(loopAt(polynomial, s, ZERO, point).compare(broken.multiply(sign))).toBe(0);
    }
  });

  it('with a filter of the derivative has T s in every term but the derivative', () => {
    // m = 2, k = 3, kp = 5, kd = 7, T = 1/4: (2s² + 3 + 5)(s/4 + 1) + 7 s
    const filtered = build(
      writtenLoop(MASS, (write) => [pid(write, '5', '0', '7', '0.25')]),
      [2, 0, 3],
    );
    const { broken, returned, exponent } = evaluateExactly(expand(filtered, [2, 0, 3], [], 0), []);
    const scale = Fraction.ofDyadic({ mantissa: 1n, exponent });
    const closed = broken.map((value, k) =>
      new Fraction(value + returned[k]).multiply(scale).abs().toNumber(),
    );
    expect(closed).toEqual([8, 9, 2, 0.5]);
  });
});

describe('columns and states', () => {
  const none: [number, number] = [2, 2];
  it.each<
    [string, (write: Write) => ReturnType<typeof pid>, Parameters<typeof writtenLoop>[2], [number, number]]
  >([
    ['PD', (w) => pid(w, '2', '0', '3'), {}, none],
    ['P of a gain that is 0', (w) => pid(w, '0', '0', '0'), {}, none],
    ['an integral', (w) => pid(w, '2', '1', '0'), {}, [3, 3]],
    ['an integral gain 1 − 1', (w) => pid(w, '2', '1-1', '0'), {}, none],
    ['a filter of the derivative', (w) => pid(w, '2', '0', '1', '0.1'), {}, [3, 3]],
    ['a filter without a derivative', (w) => pid(w, '2', '0', '0', '0.1'), {}, none],
    ['an actuator lag', (w) => pid(w, '2', '0', '0'), { actuator: { lag: '0.1' } }, [3, 3]],
    [
      'lags and delays of length 0',
      (w) => pid(w, '2', '0', '0'),
      { actuator: { lag: '0' }, sensor: { delay: '0' } },
      none,
    ],
    [
      'a delay of order 3',
      (w) => pid(w, '2', '0', '0'),
      { actuator: { delay: '0.1', padeOrder: 3 } },
      [3, 5],
    ],
    ['sampling', (w) => pid(w, '2', '0', '0'), { sampling: { delay: '0.015', padeOrder: 2 } }, [3, 4]],
    ['a sensor lag', (w) => pid(w, '2', '1', '1'), { sensor: { lag: '0.1' } }, [4, 4]],
    [
      'an unfiltered derivative behind a sensor delay',
      (w) => pid(w, '2', '0', '1'),
      { sensor: { delay: '0.1' } },
      [3, 4],
    ],
    [
      'everything',
      (w) => pid(w, '2', '1', '1', '0.1'),
      {
        sensor: { lag: '0.1', delay: '0.1' },
        actuator: { lag: '0.1', delay: '0.2' },
        sampling: { delay: '0.1' },
      },
      [9, 12],
    ],
  ])('%s', (_, law, hardware, [size, order]) => {
    const loop = build(
      writtenLoop(MASS, (write) => [law(write)], hardware),
      [1, 1, 1],
    );
    expect([loop.size, loop.order]).toEqual([size, order]);
    expect(loop.columnDegrees.reduce((sum, degree) => sum + degree, 0)).toBe(order);
    expect(Math.max(...loop.entries.map(({ row }) => row))).toBe(size - 1);
  });

  it('a gain or lag that may become 0 but also varies keeps its state', () => {
    const composed = (): ComposedLoop =>
      writtenLoop(MASS, (write) => [pid(write, '2', 'p3', '0')], { actuator: { lag: 'p4' } });
    expect(build(composed(), [1, 1, 1, 0, 0], [3, 4]).order).toBe(4);
    expect(build(composed(), [1, 1, 1, 0, 0], [3]).order).toBe(3);
    expect(build(composed(), [1, 1, 1, 0, 0], []).order).toBe(2);
  });

  it('every measured signal has its own sensor, which laws share', () => {
    const order = (outputs: readonly string[]): number =>
      build(
        writtenLoop(MASS, (write) => outputs.map((output) => ({ ...pid(write, '2', '0', '0'), output })), {
          sensor: { lag: '0.1' },
        }),
        [1, 1, 1],
      ).order;
    expect([order(['y']), order(['y', 'y']), order(['y', 'v']), order(['v', 'y', 'v'])]).toEqual([
      3, 3, 4, 4,
    ]);
    const feedback = (gain: string): number =>
      build(
        writtenLoop(
          MASS,
          (write) => [
            {
              law: 'state-feedback',
              input: 'u',
              gains: [
                { unknown: 0, dots: 0, gain: write('5') },
                { unknown: 0, dots: 1, gain: write(gain) },
              ],
              integral: { output: 'y', gain: write('1') },
            },
          ],
          { sensor: { lag: '0.1' } },
        ),
        [1, 1, 1],
      ).order;
    // Mass, integral, and a sensor for y and for each state with a gain.
    expect([feedback('2'), feedback('0')]).toEqual([6, 5]);
  });

  it('lists the laws and the delays in their paths', () => {
    const loop = build(
      writtenLoop(MASS, (write) => [pid(write, '2', '0', '0'), pid(write, '0', '1', '0')], {
        actuator: { delay: '0.1', padeOrder: 1 },
        sensor: { delay: '0.2', padeOrder: 3 },
        sampling: { delay: '0.3' },
      }),
      [1, 1, 1],
    );
    expect(loop.lawInputs).toEqual(['u', 'u']);
    const { constants } = loop.program;
    expect(loop.delays.map(({ node, padeOrder, law }) => [constants[node], padeOrder, law])).toEqual([
      [0.2, 3, -1],
      [0.3, 2, 0],
      [0.1, 1, 0],
      [0.3, 2, 1],
      [0.1, 1, 1],
    ]);
  });
});

describe('the loop as a whole', () => {
  it.each(SAMPLE_LAWS.flatMap((law) => [1, 2].map((order) => [law, order as 1 | 2] as const)))(
    '%s on a machine of order %i: a/d = 1 + L by the frequency responses of its parts',
    (law, order) => {
      const random = seededRandom(72);
      for (let trial = 0; trial < 12; trial++) {
        const { loop: composed, loopGain } = sampleLoop(random, law, order);
        const loop = build(composed);
        const { broken, returned, exponent } = evaluateExactly(expand(loop, [], [], 0), []);
        const scale = Fraction.ofDyadic({ mantissa: 1n, exponent });
        const numbers = (values: readonly bigint[]): number[] =>
          values.map((value) => new Fraction(value).multiply(scale).toNumber());
        const d = numbers(broken);
        const a = numbers(broken.map((value, k) => value + returned[k]));
        for (const s of [complex(0.3, 0.5), complex(-0.2, 4), complex(1, 11), complex(0, 30)]) {
          const expected = add(complex(1), loopGain(s));
          const ratio = divide(polynomialAt(a, s), polynomialAt(d, s));
          const error = modulus(add(ratio, multiply(complex(-1), expected)));
          expect(error).toBeLessThan(1e-9 * (1 + modulus(expected)));
        }
      }
    },
  );
});
