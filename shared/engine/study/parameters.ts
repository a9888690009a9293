import {
  bandFaults,
  type Parameter,
  type ParameterNumbers,
  type PathPart,
  type Study,
} from '../../contracts';
import { visitNames, type Expression } from '../../expressions';
import { findUnit, toSi } from '../../units';
import type { ComposedParameter } from './composed-study';
import { dependencyOrder } from './dependency-order';
import { ExactValues } from './exact-values';
import type { FaultList } from './fault-list';
import { parseScalar } from './parse-scalar';

const NUMBER_KEYS = ['nominal', 'low', 'high', 'minimum', 'maximum'] as const;
type NumberKey = (typeof NUMBER_KEYS)[number];

/** The longest cycle that is written out. */
const LONGEST_CYCLE = 8;

export interface StudyNames {
  /** By index in the study; undefined for a parameter with a fault. */
  readonly parameters: readonly (ComposedParameter | undefined)[];
  /** Definitions without a fault of their own, each after those it uses. */
  readonly definitions: ReadonlyMap<string, Expression>;
  readonly exact: ExactValues;
}

/**
 * Values of all parameters and exact definitions, evaluated in the order of their dependencies. An expression sees SI
 * values; what it gives for a parameter is in that parameter's unit.
 */
export function composeNames(study: Study, faults: FaultList): StudyNames {
  const exact = new ExactValues(faults);
  const numbers = study.parameters.map((parameter, index) => parseNumbers(parameter, index, faults));
  const indexOf = new Map(study.parameters.map(({ id }, index) => [id, index]));
  const trees = new Map<string, Expression>();
  for (const [name, scalar] of Object.entries(study.definitions ?? {})) {
    const tree = parseScalar(scalar, ['definitions', name], faults);
    if (tree !== undefined) trees.set(name, tree);
  }
  const known = new Set([...indexOf.keys(), ...Object.keys(study.definitions ?? {})]);
  for (const name of known) exact.set(name, 'failed');

  const expressionsOf = (name: string): readonly Expression[] => {
    const index = indexOf.get(name);
    if (index !== undefined) return [...numbers[index].values()];
    const tree = trees.get(name);
    return tree === undefined ? [] : [tree];
  };
  const { order, cycles } = dependencyOrder(known, (name) =>
    namesIn(expressionsOf(name)).filter((used) => known.has(used)),
  );
  const inCycle = new Set(cycles.flat());
  for (const cycle of cycles) reportCycle(cycle, indexOf, numbers, faults);

  const parameters: (ComposedParameter | undefined)[] = study.parameters.map(() => undefined);
  const definitions = new Map<string, Expression>();
  for (const name of order) {
    if (inCycle.has(name)) continue;
    const index = indexOf.get(name);
    if (index !== undefined) {
      const composed = composeParameter(study.parameters[index], index, numbers[index], exact, faults);
      parameters[index] = composed;
      if (composed !== undefined) exact.set(name, composed.hasBand ? 'toleranced' : composed.nominal);
      continue;
    }
    const tree = trees.get(name);
    if (tree === undefined) continue;
    definitions.set(name, tree);
    exact.set(name, exact.definitionState(tree, ['definitions', name]));
  }
  return { parameters, definitions, exact };
}

function parseNumbers(parameter: Parameter, index: number, faults: FaultList): Map<NumberKey, Expression> {
  const trees = new Map<NumberKey, Expression>();
  for (const key of NUMBER_KEYS) {
    const scalar = parameter[key];
    const tree = scalar === undefined ? undefined : parseScalar(scalar, ['parameters', index, key], faults);
    if (tree !== undefined) trees.set(key, tree);
  }
  return trees;
}

function namesIn(trees: readonly Expression[]): string[] {
  const names = new Set<string>();
  for (const tree of trees) visitNames(tree, (name) => names.add(name));
  return [...names];
}

/** At the first definition of the cycle, else at the number of a parameter that leads on. */
function reportCycle(
  cycle: readonly string[],
  indexOf: ReadonlyMap<string, number>,
  numbers: readonly ReadonlyMap<NumberKey, Expression>[],
  faults: FaultList,
): void {
  const definition = cycle.findIndex((name) => !indexOf.has(name));
  const start = Math.max(definition, 0);
  const chain = [...cycle.slice(start), ...cycle.slice(0, start), cycle[start]];
  const shown = chain.length > LONGEST_CYCLE ? [...chain.slice(0, LONGEST_CYCLE), '…'] : chain;
  const index = indexOf.get(chain[0]);
  const path: PathPart[] = index === undefined ? ['definitions', chain[0]] : ['parameters', index];
  if (index !== undefined) {
    const key = NUMBER_KEYS.find((candidate) => {
      const tree = numbers[index].get(candidate);
      return tree !== undefined && namesIn([tree]).includes(chain[1]);
    });
    if (key !== undefined) path.push(key);
  }
  faults.add(path, `depends on itself: ${shown.join(' → ')}`);
}

function composeParameter(
  parameter: Parameter,
  index: number,
  trees: ReadonlyMap<NumberKey, Expression>,
  exact: ExactValues,
  faults: FaultList,
): ComposedParameter | undefined {
  const before = faults.count;
  const values: Partial<Record<NumberKey, number>> = {};
  let complete = true;
  for (const key of NUMBER_KEYS) {
    if (parameter[key] === undefined) continue;
    const tree = trees.get(key);
    const value = tree === undefined ? undefined : exact.value(tree, ['parameters', index, key]);
    if (value === undefined) complete = false;
    else values[key] = value;
  }
  for (const { key, message } of bandFaults(values)) faults.add(['parameters', index, key], message);
  if (!complete || faults.count > before || values.nominal === undefined) return undefined;
  return toSiParameter(parameter, index, { ...values, nominal: values.nominal }, faults);
}

function toSiParameter(
  parameter: Parameter,
  index: number,
  values: ParameterNumbers & { readonly nominal: number },
  faults: FaultList,
): ComposedParameter | undefined {
  const unit = parameter.unit === undefined ? undefined : findUnit(parameter.unit);
  const si = (key: NumberKey, fallback: number): number => {
    const value = values[key];
    if (value === undefined) return fallback;
    const converted = unit === undefined ? value : toSi(value, unit);
    if (!Number.isFinite(converted))
      faults.add(['parameters', index, key], 'is too large for a number in SI');
    return converted;
  };
  const before = faults.count;
  const nominal = si('nominal', 0);
  const low = si('low', nominal);
  const high = si('high', nominal);
  const composed: ComposedParameter = {
    id: parameter.id,
    unit,
    nominal,
    low,
    high,
    minimum: si('minimum', -Infinity),
    maximum: si('maximum', Infinity),
    hasBand: low < high,
    kind: parameter.kind ?? 'tolerance',
  };
  return faults.count > before ? undefined : composed;
}
