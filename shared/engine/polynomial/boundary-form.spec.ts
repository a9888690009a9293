import { describe, expect, it } from 'vitest';
import { compareExactly } from '../../expressions/interval/testing/containment';
import { exactTan } from '../../expressions/elementary/testing/fixed-point-oracle';
import { toDyadic } from '../../expressions';
import { Fraction, ONE, ZERO } from '../../expressions/testing/fraction';
import { type BoundaryForm, boundaryForm, dampingSlope, halfTurnTangent } from './boundary-form';
import { ComplexFraction, complexPolynomialAt, IMAGINARY_UNIT } from './testing/complex-fraction';
import { seededRandom } from './testing/random';

const random = seededRandom(41);
const integers = (count: number): bigint[] =>
  Array.from({ length: count }, () => BigInt(Math.floor((random() - 0.5) * 2 ** 30)));
const complex = (values: readonly bigint[]): ComplexFraction[] =>
  values.map((value) => new ComplexFraction(new Fraction(value)));
const FREQUENCIES = [ZERO, new Fraction(1n, 3n), ONE, new Fraction(17n, 2n), new Fraction(1000n, 7n)];

/** Values of a form's sheets at ω, exact. */
function sheetValues(
  form: BoundaryForm,
  d: readonly bigint[],
  n: readonly bigint[],
  omega: Fraction,
): ComplexFraction[] {
  const scale = Fraction.ofDyadic({ mantissa: 1n, exponent: form.exponent });
  return form.sheetsAt(d, n).map(({ re, im }) =>
    complexPolynomialAt(
      re.map((value, k) => new ComplexFraction(new Fraction(value), new Fraction(im[k]))),
      new ComplexFraction(omega),
    ).scale(scale),
  );
}

/** Checks that the sheets are what `expected` makes of d(z) and n(z) at the point z of the boundary. */
function check(
  form: BoundaryForm,
  pointAt: (omega: Fraction) => ComplexFraction,
  expected: (d: ComplexFraction, n: ComplexFraction) => ComplexFraction[],
): void {
  for (let trial = 0; trial < 10; trial++) {
    const [d, n] = [integers(form.degree + 1), integers(form.degree + 1)];
    for (const omega of FREQUENCIES) {
      const z = pointAt(omega);
      const values = sheetValues(form, d, n, omega);
      const wanted = expected(complexPolynomialAt(complex(d), z), complexPolynomialAt(complex(n), z));
      expect(values).toHaveLength(wanted.length);
      values.forEach((value, i) => {
        expect(value.subtract(wanted[i]).isZero).toBe(true);
      });
    }
  }
}

const onAxis = (omega: Fraction): ComplexFraction => IMAGINARY_UNIT.scale(omega);

describe('what must not vanish', () => {
  it.each([0, 1, 5, 8])('stability: a(jω) at degree %i', (degree) => {
    check(boundaryForm('stability', 0, degree), onAxis, (d, n) => [d.add(n)]);
  });

  it.each([0, 0.1, 0.75, 4, 12, 1e-30])('decay rate %d: a(−σ + jω)', (rate) => {
    check(
      boundaryForm('decayRate', rate, 6),
      (omega) => onAxis(omega).add(new ComplexFraction(Fraction.of(-rate))),
      (d, n) => [d.add(n)],
    );
  });

  it.each([0, 0.05, 0.5, 0.7071, 0.99])('damping ratio %d: a on the ray', (ratio) => {
    const form = boundaryForm('dampingRatio', ratio, 7);
    const direction = new ComplexFraction(Fraction.of(-dampingSlope(ratio)), ONE);
    check(
      form,
      (omega) => direction.scale(omega),
      (d, n) => [d.add(n)],
    );
    expect(form.cosine).toBe(ratio);
  });

  it.each([1, 1.5, 2, 10])('gain margin %d: d + κ n at both ends', (margin) => {
    const form = boundaryForm('gainMargin', margin, 5);
    expect(form.sheets).toBe(2);
    const low = sheetValues(form, [0n, 0n, 0n, 0n, 0n, 0n], [1n, 0n, 0n, 0n, 0n, 0n], ZERO)[0].re;
    // κ = 1/g is rounded down, by at most two units.
    const product = low.multiply(Fraction.of(margin));
    expect(product.compare(ONE)).toBeLessThanOrEqual(0);
    expect(product.compare(Fraction.of(1 - 4e-16))).toBeGreaterThan(0);
    check(form, onAxis, (d, n) => [d.add(n.scale(low)), d.add(n.scale(Fraction.of(margin)))]);
  });

  it.each([0.3, Math.PI / 4, 1.2, 2.5])('phase margin %d: a + jτ(2d − a) at both ends', (angle) => {
    const tangent = new ComplexFraction(ZERO, Fraction.of(halfTurnTangent(angle)));
    check(boundaryForm('phaseMargin', angle, 5), onAxis, (d, n) => {
      const turned = d.add(d).subtract(d.add(n)).multiply(tangent);
      return [d.add(n).add(turned), d.add(n).subtract(turned)];
    });
  });

  it('phase margin: the sheets are zero exactly where L = −e^(∓jφ)', () => {
    // d = 1, n = L = −(1 − jτ)²/(1 + τ²) = −e^(−2j atan τ): a turn by φ brings it to −1.
    const tau = Fraction.of(halfTurnTangent(1));
    const form = boundaryForm('phaseMargin', 1, 1);
    // With integers: d + n s and s = jω real only, so L is made from d and n of degree 1 at ω = 1.
    const bits = 200n;
    const scaled = (value: Fraction): bigint => (value.numerator << bits) / value.denominator;
    const norm = ONE.add(tau.multiply(tau));
    const re = ONE.subtract(tau.multiply(tau)).divide(norm).negate();
    const im = tau.add(tau).divide(norm);
    const values = sheetValues(form, [1n << bits, 0n], [scaled(re), scaled(im)], ONE);
    const size = new Fraction(1n << bits);
    const moduli = values.map((value) => value.squaredModulus.divide(size.multiply(size)).toNumber());
    expect(Math.min(...moduli)).toBeLessThan(1e-100);
    expect(Math.max(...moduli)).toBeGreaterThan(1e-3);
  });

  it('modulus margin: the pair a and d with its radius', () => {
    const form = boundaryForm('modulusMargin', 0.5, 4);
    expect(form.discRadius).toBe(0.5);
    check(form, onAxis, (d, n) => [d.add(n), d]);
  });
});

describe('rounding to the strict side', () => {
  it('the damping slope is at least ζ/√(1 − ζ²), by a few units', () => {
    for (let trial = 0; trial < 300; trial++) {
      const ratio = trial % 3 === 0 ? 1 - random() * 1e-6 : random() * 10 ** (-3 * random());
      const [slope, zeta] = [dampingSlope(ratio), ratio].map((value) => Fraction.of(value));
      // x ≥ ζ/√(1 − ζ²) is x²(1 − ζ²) ≥ ζ².
      const left = slope.multiply(slope).multiply(ONE.subtract(zeta.multiply(zeta)));
      const right = zeta.multiply(zeta);
      expect(left.compare(right)).toBeGreaterThanOrEqual(0);
      expect(left.divide(right).compare(Fraction.of(1 + 1e-14))).toBeLessThan(0);
    }
    expect(dampingSlope(0)).toBe(0);
  });

  it('the tangent of half the phase margin is at least the true one, by a few units', () => {
    for (let trial = 0; trial < 300; trial++) {
      const angle = 3.1 * random();
      const tangent = halfTurnTangent(angle);
      const exact = exactTan(angle / 2);
      expect(compareExactly(toDyadic(tangent), exact)).toBeGreaterThanOrEqual(0);
      expect(compareExactly(toDyadic(tangent * (1 - 2e-15)), exact)).toBeLessThan(0);
    }
  });
});
