import { describe, expect, it } from 'vitest';
import { ExactEvaluator, fromDyadic } from '../../expressions';
import { EigenvalueSolver, PolynomialRootSolver, sortPoles } from '../linalg';
import { degreeOf, evaluateExactly } from '../polynomial/exact-point';
import { expandLoop } from '../polynomial/loop-polynomial';
import { seededRandom } from '../polynomial/testing/random';
import { buildLoop } from './build-loop';
import type { ComposedLoop } from './composed';
import type { LoopMatrix } from './loop-matrix';
import { LoopPoles } from './loop-poles';
import { NominalValues } from './nominal-values';
import { StateMatrix } from './state-matrix';
import { complex, divide, modulus, multiply, polynomialAt } from './testing/complex';
import { SAMPLE_LAWS, sampleLoop } from './testing/sample-loops';
import { MASS, writtenLoop } from './testing/written-loop';

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

/** Coefficients of the closed and of the broken loop by exact expansion, ascending. */
function expanded(
  loop: LoopMatrix,
  parameters: readonly number[],
): { closed: Float64Array; broken: Float64Array } {
  const polynomial = expandLoop(loop, new ExactEvaluator(loop.program, parameters, []), 0);
  if (polynomial === undefined) throw new Error('not rational');
  expect(degreeOf(polynomial)).toBe(loop.order);
  const { broken, returned, exponent } = evaluateExactly(polynomial, []);
  return {
    closed: Float64Array.from(broken, (value, k) => fromDyadic(value + returned[k], exponent)),
    broken: Float64Array.from(broken, (value) => fromDyadic(value, exponent)),
  };
}

/** a_n Π (s − λ_i) has the values of the polynomial, away from its roots. */
function expectProduct(coefficients: Float64Array, re: Float64Array, im: Float64Array): void {
  const lead = coefficients[coefficients.length - 1];
  for (const s of [complex(3, 0.5), complex(1, 7), complex(20, -40), complex(300, 100)]) {
    let product = complex(lead);
    re.forEach((value, i) => (product = multiply(product, complex(s.re - value, s.im - im[i]))));
    const value = polynomialAt([...coefficients], s);
    expect(modulus(divide(product, value)), String(s.re)).toBeCloseTo(1, 7);
    expect(divide(product, value).re).toBeCloseTo(1, 7);
  }
}

function expectRoots(coefficients: Float64Array, re: Float64Array, im: Float64Array): void {
  const order = coefficients.length - 1;
  const [rootRe, rootIm] = [new Float64Array(order), new Float64Array(order)];
  expect(new PolynomialRootSolver(order).solve(coefficients, order, rootRe, rootIm)).toBe(order);
  const left = new Set(rootRe.keys());
  // Each pole takes the root nearest to it, so that no root serves twice.
  for (let i = 0; i < order; i++) {
    let nearest = -1;
    let distance = Infinity;
    for (const j of left) {
      const own = Math.hypot(re[i] - rootRe[j], im[i] - rootIm[j]);
      if (own < distance) [nearest, distance] = [j, own];
    }
    left.delete(nearest);
    expect(distance).toBeLessThan(1e-5 * (1 + Math.hypot(re[i], im[i])));
  }
  expect(left.size).toBe(0);
}

describe('state matrix and poles', () => {
  it.each(SAMPLE_LAWS.flatMap((law) => [1, 2].map((order) => [law, order as 1 | 2] as const)))(
    '%s on a machine of order %i: eigenvalues are the roots of the expanded polynomials',
    (law, order) => {
      const random = seededRandom(81);
      const orders = new Set<number>();
      for (let trial = 0; trial < 20; trial++) {
        const loop = build(sampleLoop(random, law, order).loop);
        orders.add(loop.order);
        const { closed, broken } = expanded(loop, []);
        const poles = new LoopPoles(loop);
        expect(poles.order).toBe(loop.order);
        expect(poles.closeLoop([])).toBe(true);
        expect(poles.breakLoop(0)).toBe(true);
        expect(poles.leadingRatio).toBeCloseTo(closed[loop.order] / broken[loop.order], 10);
        expectProduct(closed, poles.closedRe, poles.closedIm);
        expectProduct(broken, poles.brokenRe, poles.brokenIm);
        // Equal sensors of several states give multiple poles, which rounding scatters.
        if (law === 'state-feedback') continue;
        expectRoots(closed, poles.closedRe, poles.closedIm);
        expectRoots(broken, poles.brokenRe, poles.brokenIm);
      }
      expect(orders.size).toBeGreaterThan(3);
    },
  );

  it('is the companion form for a mass, spring and damper under P control', () => {
    const loop = build(
      writtenLoop(MASS, (write) => [
        { law: 'pid', input: 'u', output: 'y', kp: write('p3'), ki: 0, kd: 0, derivativeTime: 0 },
      ]),
      [2, 3, 4, 6],
      [0, 1, 2, 3],
    );
    const matrix = new StateMatrix(loop);
    matrix.evaluate([2, 3, 4, 6]);
    expect(matrix.assemble(-1)).toBe(true);
    expect([...matrix.a]).toEqual([0, 1, -5, -1.5]);
    expect(Math.abs(matrix.leading) * 2 ** matrix.leadingExponent).toBe(2);
    expect(matrix.assemble(0)).toBe(true);
    expect([...matrix.a]).toEqual([0, 1, -2, -1.5]);
    // No other law to break: the loop stays closed.
    expect(matrix.assemble(1)).toBe(true);
    expect([...matrix.a]).toEqual([0, 1, -5, -1.5]);
    matrix.evaluate([1, 0, 9, 0]);
    expect(matrix.assemble(-1)).toBe(true);
    expect([...matrix.a].map((value) => value + 0)).toEqual([0, 1, -9, 0]);
  });

  it('of two laws opens one and keeps the other', () => {
    const loop = build(
      writtenLoop(MASS, (write) => [
        { law: 'pid', input: 'u', output: 'y', kp: write('10'), ki: 0, kd: 0, derivativeTime: 0 },
        { law: 'pid', input: 'u', output: 'v', kp: write('5'), ki: 0, kd: 0, derivativeTime: 0 },
      ]),
      [1, 1, 1],
    );
    const matrix = new StateMatrix(loop);
    matrix.evaluate([1, 1, 1]);
    const rows = [-1, 0, 1].map((law) => {
      matrix.assemble(law);
      return [...matrix.a];
    });
    expect(rows).toEqual([
      [0, 1, -11, -6],
      [0, 1, -1, -6],
      [0, 1, -11, -1],
    ]);
  });

  it('has the leading coefficients apart where an unfiltered derivative meets the highest power', () => {
    // 2 ẋ = −x + u with u = −3 ẋ: a = 5 s + 1, d = 2 s + 1.
    const loop = build(
      writtenLoop(
        {
          order: 1,
          coefficients: [[['1']], [['2']]],
          inputs: { u: ['1'] },
          outputs: { y: { position: ['1'] } },
        },
        (write) => [{ law: 'pid', input: 'u', output: 'y', kp: 0, ki: 0, kd: write('3'), derivativeTime: 0 }],
      ),
    );
    const poles = new LoopPoles(loop);
    expect([poles.closeLoop([]), poles.breakLoop(0)]).toEqual([true, true]);
    expect(poles.closedRe[0]).toBeCloseTo(-0.2, 14);
    expect(poles.brokenRe[0]).toBe(-0.5);
    expect(poles.leadingRatio).toBeCloseTo(2.5, 14);
  });

  it('does not exist where a pole has left through infinity or a coefficient is not finite', () => {
    const loop = build(
      writtenLoop(
        MASS,
        (write) => [{ law: 'pid', input: 'u', output: 'y', kp: write('1'), ki: 0, kd: 0, derivativeTime: 0 }],
        { actuator: { lag: 'p3' } },
      ),
      [1, 1, 1, 0.1],
      [0, 3],
    );
    const poles = new LoopPoles(loop);
    expect(poles.closeLoop([1, 1, 1, 0.1])).toBe(true);
    const before = [...poles.closedRe];
    expect(poles.closeLoop([0, 1, 1, 0.1])).toBe(false);
    expect(poles.closeLoop([1, 1, 1, 0])).toBe(false);
    expect(poles.closeLoop([1, NaN, 1, 0.1])).toBe(false);
    expect(poles.closeLoop([1, Infinity, 1, 0.1])).toBe(false);
    expect(poles.closeLoop([1, 1, 1, 0.1])).toBe(true);
    expect([...poles.closedRe]).toEqual(before);
  });

  it('gives the same poles at a point whatever was computed before', () => {
    const random = seededRandom(82);
    const loop = build(sampleLoop(random, 'state-space', 2).loop);
    const matrix = new StateMatrix(loop);
    const solver = new EigenvalueSolver(loop.order);
    const read = (law: number): number[] => {
      matrix.evaluate([]);
      matrix.assemble(law);
      const [re, im] = [new Float64Array(loop.order), new Float64Array(loop.order)];
      solver.compute(matrix.a.slice(), loop.order, re, im);
      sortPoles(re, im, loop.order);
      return [...re, ...im];
    };
    const first = read(-1);
    expect(read(0)).not.toEqual(first);
    expect(read(-1)).toEqual(first);
  });
});
