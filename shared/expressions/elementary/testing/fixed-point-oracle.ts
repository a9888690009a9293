import { highWord, lowWord } from '../float-bits';

/**
 * Reference values for the specs, by Taylor series in 320-bit fixed point with BigInt. Nothing here
 * shares a constant, a table or a step with the functions under test, except the reading of a
 * double's bits.
 */

/** mantissa·2^exponent. */
export interface BinaryValue {
  readonly mantissa: bigint;
  readonly exponent: number;
}

const BITS = 320;
const ONE = 1n << BigInt(BITS);
/** Enough for the largest double modulo 2π. */
const PI_BITS = 1420;

/** A finite double, exactly. */
export function binaryValue(x: number): BinaryValue {
  const high = highWord(x);
  const field = (high >>> 20) & 0x7ff;
  const fraction = BigInt(high & 0xfffff) * 4294967296n + BigInt(lowWord(x));
  const size = field === 0 ? fraction : fraction + (1n << 52n);
  return { mantissa: high >>> 31 === 1 ? -size : size, exponent: Math.max(field, 1) - 1075 };
}

/** a·2^shift, rounded down. */
function shifted(a: bigint, shift: number): bigint {
  return shift >= 0 ? a << BigInt(shift) : a >> BigInt(-shift);
}

function toFixed(value: BinaryValue, bits = BITS): bigint {
  return shifted(value.mantissa, value.exponent + bits);
}

function fromFixed(mantissa: bigint): BinaryValue {
  return { mantissa, exponent: -BITS };
}

function times(a: bigint, b: bigint): bigint {
  return (a * b) >> BigInt(BITS);
}

function roundedQuotient(a: bigint, b: bigint): bigint {
  const twice = 2n * a + b;
  const quotient = twice / (2n * b);
  return twice < 0n && quotient * 2n * b !== twice ? quotient - 1n : quotient;
}

function integerRoot(a: bigint): bigint {
  if (a < 2n) return a;
  let root = 1n << BigInt(Math.ceil(a.toString(2).length / 2));
  for (;;) {
    const next = (root + a / root) >> 1n;
    if (next >= root) return root;
    root = next;
  }
}

/** atan(1/n)·2^bits by Gregory's series. */
function arctangentOfReciprocal(n: bigint, bits: number): bigint {
  let power = (1n << BigInt(bits)) / n;
  let sum = power;
  for (let k = 3n; power !== 0n; k += 2n) {
    power = -power / (n * n);
    sum += power / k;
  }
  return sum;
}

/** π·2^bits by Machin's formula of 1706. */
export function piFixed(bits: number): bigint {
  const guarded = bits + 16;
  return (16n * arctangentOfReciprocal(5n, guarded) - 4n * arctangentOfReciprocal(239n, guarded)) >> 16n;
}

const PI_LONG = piFixed(PI_BITS);
const PI = piFixed(BITS);

/** 2·atanh z = ln((1 + z)/(1 − z)). */
function twiceAreaTangent(z: bigint): bigint {
  const square = times(z, z);
  let power = z;
  let sum = 0n;
  for (let k = 1n; power !== 0n && power !== -1n; k += 2n) {
    sum += power / k;
    power = times(power, square);
  }
  return 2n * sum;
}

const LN2 = twiceAreaTangent(ONE / 3n);

function logFixed(x: BinaryValue): bigint {
  const length = x.mantissa.toString(2).length;
  let k = length + x.exponent;
  let m = shifted(x.mantissa, BITS - length);
  if (m * 10n < ONE * 7n) {
    m <<= 1n;
    k -= 1;
  }
  return BigInt(k) * LN2 + twiceAreaTangent(((m - ONE) << BigInt(BITS)) / (m + ONE));
}

function expOfFixed(x: bigint): BinaryValue {
  const k = roundedQuotient(x, LN2);
  const r = x - k * LN2;
  let term = ONE;
  let sum = 0n;
  for (let n = 1n; term !== 0n && term !== -1n; n += 1n) {
    sum += term;
    term = times(term, r) / n;
  }
  return { mantissa: sum, exponent: Number(k) - BITS };
}

/** sin(x + quarters·π/2). */
function sineFrom(x: BinaryValue, quarters: bigint): BinaryValue {
  const long = toFixed(x, PI_BITS);
  const quadrant = roundedQuotient(2n * long, PI_LONG);
  const rest = 2n * long - quadrant * PI_LONG;
  const r = shifted(rest, BITS - PI_BITS - 1);
  const turn = (((quadrant + quarters) % 4n) + 4n) % 4n;
  const square = times(r, r);
  let term = turn % 2n === 0n ? r : ONE;
  let sum = 0n;
  for (let n = turn % 2n === 0n ? 2n : 1n; term !== 0n && term !== -1n; n += 2n) {
    sum += term;
    term = -times(term, square) / (n * (n + 1n));
  }
  return fromFixed(turn >= 2n ? -sum : sum);
}

/** atan(n/d) in [0, π/2] for fixed n >= 0, d >= 0, not both 0. */
function arctangentFixed(n: bigint, d: bigint): bigint {
  if (n > d) return (PI >> 1n) - arctangentFixed(d, n);
  let t = (n << BigInt(BITS)) / d;
  const halvings = 4n;
  for (let i = 0n; i < halvings; i += 1n) {
    t = (t << BigInt(BITS)) / (ONE + integerRoot((ONE + times(t, t)) << BigInt(BITS)));
  }
  const square = times(t, t);
  let power = t;
  let sum = 0n;
  for (let k = 1n; power !== 0n && power !== -1n; k += 2n) {
    sum += power / k;
    power = -times(power, square);
  }
  return sum << halvings;
}

function absolute(a: bigint): bigint {
  return a < 0n ? -a : a;
}

function angleFixed(y: bigint, x: bigint): bigint {
  const acute = arctangentFixed(absolute(y), absolute(x));
  const upper = x < 0n ? PI - acute : acute;
  return y < 0n ? -upper : upper;
}

export function exactExp(x: number): BinaryValue {
  return expOfFixed(toFixed(binaryValue(x)));
}

export function exactLog(x: number): BinaryValue {
  return fromFixed(logFixed(binaryValue(x)));
}

/** x > 0. */
export function exactPow(x: number, y: number): BinaryValue {
  const exponent = binaryValue(y);
  return expOfFixed(shifted(logFixed(binaryValue(x)) * exponent.mantissa, exponent.exponent));
}

export function exactSin(x: number): BinaryValue {
  return sineFrom(binaryValue(x), 0n);
}

export function exactCos(x: number): BinaryValue {
  return sineFrom(binaryValue(x), 1n);
}

export function exactTan(x: number): BinaryValue {
  const sine = exactSin(x).mantissa;
  const cosine = exactCos(x).mantissa;
  return { mantissa: (sine << 500n) / cosine, exponent: -500 };
}

/** |y/x| not below 2^−200. */
export function exactAtan2(y: number, x: number): BinaryValue {
  const top = binaryValue(y);
  const side = binaryValue(x);
  const common = Math.min(top.exponent, side.exponent);
  return fromFixed(
    angleFixed(shifted(top.mantissa, top.exponent - common), shifted(side.mantissa, side.exponent - common)),
  );
}

export function exactAtan(x: number): BinaryValue {
  return exactAtan2(x, 1);
}

function circleComplement(x: bigint): bigint {
  return integerRoot(ONE * ONE - x * x);
}

export function exactAsin(x: number): BinaryValue {
  const fixed = toFixed(binaryValue(x));
  return fromFixed(angleFixed(fixed, circleComplement(fixed)));
}

export function exactAcos(x: number): BinaryValue {
  const fixed = toFixed(binaryValue(x));
  return fromFixed(angleFixed(circleComplement(fixed), fixed));
}

/**
 * |computed − exact| in units in the last place of the exact value (of 2^−1074 below the normal
 * range); exact must not be 0. A computed infinity counts as 2^1024, the value it was rounded from
 * at the least.
 */
export function errorInUlps(computed: number, exact: BinaryValue): number {
  if (computed !== computed) return Infinity;
  const infinite = computed === Infinity || computed === -Infinity;
  const value = infinite ? { mantissa: computed > 0 ? 1n : -1n, exponent: 1024 } : binaryValue(computed);
  const top = absolute(exact.mantissa).toString(2).length + exact.exponent - 1;
  const ulpExponent = Math.max(top, -1022) - 52;
  const scale = 30 - ulpExponent;
  const difference =
    shifted(value.mantissa, value.exponent + scale) - shifted(exact.mantissa, exact.exponent + scale);
  return Number(absolute(difference)) / 1073741824;
}
