import type { ExactPolynomial, RationalFunction } from '../../expressions';
import {
  type Denominator,
  type ExactEvaluator,
  ExpansionLimitError,
  exponentOf,
  leastCommonMultiple,
} from '../../expressions';
import type { LoopMatrix } from '../loop/loop-matrix';

/** Σ coefficient · 2^exponent · s^power · Π p_i^exponents[i], exact. */
export interface ExactTerm {
  readonly power: number;
  readonly exponents: readonly number[];
  readonly coefficient: bigint;
}

/**
 * det P(s, p) with the output of one law multiplied by κ: broken + κ · returned, up to its sign and the divisors that
 * were cleared from the rows (free of s and κ). The closed loop is a = broken + returned, and 1 + L = a / broken. Both
 * share the scale 2^exponent.
 */
export interface LoopPolynomial {
  readonly variables: number;
  readonly exponent: number;
  readonly broken: readonly ExactTerm[];
  readonly returned: readonly ExactTerm[];
  /** Divisors of the entries that depend on a variable: where one vanishes the loop is not defined. */
  readonly divisors: readonly ExactPolynomial[];
}

/** Most products of two terms that one expansion may take (about three seconds on a small machine). */
export const MAXIMUM_TERM_PRODUCTS = 4_000_000;

interface PackedEntry {
  readonly column: number;
  readonly keys: number[];
  readonly coefficients: bigint[];
}

/** A row's entries as integer polynomials in (κ, s, p) under one packing. */
interface PackedRow {
  readonly entries: readonly PackedEntry[];
}

interface RowEntry {
  readonly column: number;
  readonly power: number;
  readonly broken: boolean;
  readonly value: RationalFunction;
}

/**
 * Expands det P(s, p) exactly by minors, row by row: a map from the set of used columns to a polynomial, dropping
 * sets that lack a column whose last row has passed.
 * Source: W. M. Gentleman & S. C. Johnson, ACM Trans. Math. Software 2 (1976) 232–241.
 *
 * @param brokenLaw the law whose output carries κ; −1: none (returned is then empty)
 * @returns undefined where a variable enters otherwise than rationally
 * @throws ExpansionLimitError beyond MAXIMUM_TERM_PRODUCTS
 */
export function expandLoop(
  loop: LoopMatrix,
  evaluator: ExactEvaluator,
  brokenLaw: number,
): LoopPolynomial | undefined {
  const rows: RowEntry[][] = Array.from({ length: loop.size }, () => []);
  for (const { row, column, power, node, law } of loop.entries) {
    const value = evaluator.node(node);
    if (value === undefined) return undefined;
    rows[row].push({ column, power, broken: law >= 0 && law === brokenLaw, value });
  }
  const variables = evaluator.packing.variables;
  const divisors = new Map<string, ExactPolynomial>();
  const cleared = rows.map((row) => clearRow(row, divisors));
  const radices = packingRadices(cleared, variables);
  let exponent = 0;
  const packed = cleared.map((row) => {
    const result = packRow(row, radices);
    exponent += result.exponent;
    return result.row;
  });
  const determinant = expandByMinors(packed, loop.size);
  return {
    variables,
    exponent,
    divisors: [...divisors.values()],
    ...separate(determinant, radices, variables),
  };
}

interface ClearedEntry {
  readonly column: number;
  readonly power: number;
  readonly broken: boolean;
  readonly value: ExactPolynomial;
}

/** Multiplies a row by the least common multiple of its denominators, which are noted in `divisors`. */
function clearRow(row: readonly RowEntry[], divisors: Map<string, ExactPolynomial>): ClearedEntry[] {
  let common: Denominator = new Map();
  for (const { value } of row) common = leastCommonMultiple(common, value.denominator);
  for (const [key, { factor }] of common) if (factor.constantValue === undefined) divisors.set(key, factor);
  return row
    .map((entry) => ({ ...entry, value: entry.value.over(common) }))
    .filter(({ value }) => !value.isZero);
}

/**
 * Radix of each digit of a packed key, in the order κ, s, p_0, …: one more than the largest degree that the
 * determinant can have there, the sum over the rows.
 */
function packingRadices(rows: readonly (readonly ClearedEntry[])[], variables: number): number[] {
  const radices = new Array<number>(variables + 2).fill(1);
  for (const row of rows) {
    const degrees = new Array<number>(variables + 2).fill(0);
    for (const { power, broken, value } of row) {
      degrees[0] = Math.max(degrees[0], broken ? 1 : 0);
      degrees[1] = Math.max(degrees[1], power);
      value.degrees.forEach((degree, i) => (degrees[i + 2] = Math.max(degrees[i + 2], degree)));
    }
    degrees.forEach((degree, i) => (radices[i] += degree));
  }
  let range = 1;
  for (const radix of radices) range *= radix;
  if (range > 4e15)
    throw new ExpansionLimitError('too many toleranced parameters of high degree; make some of them exact');
  return radices;
}

function packRow(
  row: readonly ClearedEntry[],
  radices: readonly number[],
): { row: PackedRow; exponent: number } {
  let exponent = Infinity;
  for (const { value } of row) exponent = Math.min(exponent, value.exponent);
  if (row.length === 0) exponent = 0;
  const byColumn = new Map<number, Map<number, bigint>>();
  for (const { column, power, broken, value } of row) {
    let terms = byColumn.get(column);
    if (terms === undefined) byColumn.set(column, (terms = new Map<number, bigint>()));
    const shift = BigInt(value.exponent - exponent);
    for (const [key, coefficient] of value.terms) {
      let packed = 0;
      let weight = radices[0] * radices[1];
      for (let i = 0; i < value.packing.variables; i++) {
        packed += exponentOf(key, i, value.packing.bits) * weight;
        weight *= radices[i + 2];
      }
      packed += (broken ? 1 : 0) + power * radices[0];
      terms.set(packed, (terms.get(packed) ?? 0n) + (coefficient << shift));
    }
  }
  const entries = [...byColumn].map(([column, terms]) => {
    const kept = [...terms].filter(([, coefficient]) => coefficient !== 0n);
    return {
      column,
      keys: kept.map(([key]) => key),
      coefficients: kept.map(([, coefficient]) => coefficient),
    };
  });
  return { row: { entries: entries.filter(({ keys }) => keys.length > 0) }, exponent };
}

function expandByMinors(rows: readonly PackedRow[], size: number): Map<number, bigint> {
  const order = rowOrder(rows, size);
  let products = 0;
  let minors = new Map<number, Map<number, bigint>>([[0, new Map([[0, 1n]])]]);
  order.forEach((rowIndex, step) => {
    const needed = closedColumns(rows, order, step, size);
    const next = new Map<number, Map<number, bigint>>();
    for (const [mask, minor] of minors) {
      for (const { column, keys, coefficients } of rows[rowIndex].entries) {
        const bit = 1 << column;
        const union = mask | bit;
        if ((mask & bit) !== 0 || (union & needed) !== needed) continue;
        let target = next.get(union);
        if (target === undefined) next.set(union, (target = new Map<number, bigint>()));
        const negative = (bitCount(mask >>> column) & 1) === 1;
        products += minor.size * keys.length;
        if (products > MAXIMUM_TERM_PRODUCTS) {
          throw new ExpansionLimitError(
            `more than ${MAXIMUM_TERM_PRODUCTS} products of terms; leave out states or couplings that do not matter`,
          );
        }
        for (let i = 0; i < keys.length; i++) {
          const factor = negative ? -coefficients[i] : coefficients[i];
          for (const [key, coefficient] of minor) {
            const sum = key + keys[i];
            target.set(sum, (target.get(sum) ?? 0n) + factor * coefficient);
          }
        }
      }
    }
    for (const terms of next.values()) {
      for (const [key, coefficient] of terms) if (coefficient === 0n) terms.delete(key);
    }
    minors = next;
  });
  return minors.get(size === 0 ? 0 : allColumns(size)) ?? new Map<number, bigint>();
}

/** Each time the row that opens fewest new columns and closes most, so that few column sets are open at once. */
function rowOrder(rows: readonly PackedRow[], size: number): number[] {
  const columnsOf = rows.map(({ entries }) => entries.reduce((mask, { column }) => mask | (1 << column), 0));
  const left = new Set(rows.keys());
  const order: number[] = [];
  let open = 0;
  while (order.length < size) {
    let best = -1;
    let bestCost = Infinity;
    for (const row of left) {
      let others = 0;
      for (const other of left) if (other !== row) others |= columnsOf[other];
      const opens = bitCount(columnsOf[row] & ~open);
      const closes = bitCount((open | columnsOf[row]) & ~others);
      if (opens - closes < bestCost) {
        bestCost = opens - closes;
        best = row;
      }
    }
    left.delete(best);
    open |= columnsOf[best];
    order.push(best);
  }
  return order;
}

/** Columns that occur in no row after `step`: every surviving set must hold them. */
function closedColumns(
  rows: readonly PackedRow[],
  order: readonly number[],
  step: number,
  size: number,
): number {
  let later = 0;
  for (let i = step + 1; i < order.length; i++) {
    for (const { column } of rows[order[i]].entries) later |= 1 << column;
  }
  return allColumns(size) & ~later;
}

function allColumns(size: number): number {
  return size === 31 ? 0x7fffffff : (1 << size) - 1;
}

function bitCount(mask: number): number {
  let count = 0;
  for (let rest = mask; rest !== 0; rest &= rest - 1) count++;
  return count;
}

function separate(
  determinant: ReadonlyMap<number, bigint>,
  radices: readonly number[],
  variables: number,
): { broken: ExactTerm[]; returned: ExactTerm[] } {
  const broken: ExactTerm[] = [];
  const returned: ExactTerm[] = [];
  for (const [key, coefficient] of determinant) {
    let rest = key;
    const digits = radices.map((radix) => {
      const digit = rest % radix;
      rest = Math.floor(rest / radix);
      return digit;
    });
    const term = { power: digits[1], exponents: digits.slice(2, 2 + variables), coefficient };
    (digits[0] === 1 ? returned : broken).push(term);
  }
  return { broken, returned };
}
