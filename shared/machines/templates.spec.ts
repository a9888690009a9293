import { describe, expect, it } from 'vitest';
import { isSecondOrder, RESERVED_NAMES, TEMPLATE_IDS, type CustomMachine, type Scalar } from '../contracts';
import { parseExpression, visitNames, type Expression } from '../expressions';
import { findUnit, toSi } from '../units';
import type { MachineTemplate } from './template';
import { checkTemplateParameters, expandMachine, templateOf, templates } from './templates';

type Values = Readonly<Record<string, number>>;

/** A few lines that evaluate a template's entries apart from the program's own evaluator. */
function valueOf(expression: Expression, values: Values): number {
  switch (expression.kind) {
    case 'number':
      return expression.value;
    case 'name':
      return values[expression.name];
    case 'negate':
      return -valueOf(expression.operand, values);
    case 'call':
      throw new Error('templates call no functions');
    case 'binary': {
      const left = valueOf(expression.left, values);
      const right = valueOf(expression.right, values);
      switch (expression.operator) {
        case '+':
          return left + right;
        case '-':
          return left - right;
        case '*':
          return left * right;
        case '/':
          return left / right;
        case '^':
          return left ** right;
      }
    }
  }
}

const numbers = (matrix: readonly (readonly Scalar[])[], values: Values) =>
  matrix.map((row) => row.map((entry) => valueOf(parseExpression(String(entry)), values)));

function entriesOf(machine: CustomMachine): Scalar[] {
  const columns = [...Object.values(machine.inputs ?? {}), ...Object.values(machine.disturbances ?? {})];
  if (isSecondOrder(machine)) {
    const outputs = Object.values(machine.outputs ?? {}).flatMap(({ position = [], velocity = [] }) => [
      position,
      velocity,
    ]);
    return [machine.mass, machine.damping, machine.stiffness, columns, outputs].flat(2);
  }
  return [machine.descriptor ?? [], machine.dynamics, columns, Object.values(machine.outputs ?? {})].flat(2);
}

function nominalOf(template: MachineTemplate): Values {
  return Object.fromEntries(
    template.parameters.map(({ id, nominal, unit }) => {
      const known = findUnit(unit);
      return [id, known === undefined ? nominal : toSi(nominal, known)];
    }),
  );
}

function secondOrder(id: 'two-mass-drive' | 'balancing-carrier' | 'suspended-cabin' | 'mass-spring-damper') {
  const { machine } = templateOf(id);
  if (!isSecondOrder(machine)) throw new Error(`${id} is of second order`);
  return machine;
}

function singleTrackMachine() {
  const { machine } = templateOf('single-track');
  if (isSecondOrder(machine) || machine.descriptor === undefined)
    throw new Error('of first order with a descriptor');
  return { ...machine, descriptor: machine.descriptor };
}

const determinant = ([[a, b], [c, d]]: number[][]) => a * d - b * c;

describe('templates', () => {
  it('are one for every id of the study format', () => {
    expect(templates.map(({ id }) => id)).toEqual([...TEMPLATE_IDS]);
  });

  it.each([
    ['mass-spring-damper', 'm m0 k c', 'q', 'u', 'push', 'q'],
    ['two-mass-drive', 'm m0 M k c b', 'q1 q2', 'u', 'push', 'drive carriage'],
    ['balancing-carrier', 'm h J Mb R c d', 'x theta', 'u', 'push', 'x tilt'],
    ['suspended-cabin', 'm m0 mu ks cs kt', 'zs zu', 'f', 'road', 'cabin stroke cabinVelocity'],
    ['single-track', 'm m0 J0 lf lr xp V cf cr', 'vy r', 'delta', 'sidewind', 'r vy'],
  ] as const)(
    '%s has the names of the study format',
    (id, parameters, coordinates, inputs, disturbances, outputs) => {
      const { machine, parameters: own } = templateOf(id);
      expect(own.map((parameter) => parameter.id).join(' ')).toBe(parameters);
      expect((isSecondOrder(machine) ? machine.coordinates : machine.states).join(' ')).toBe(coordinates);
      expect(Object.keys(machine.inputs ?? {}).join(' ')).toBe(inputs);
      expect(Object.keys(machine.disturbances ?? {}).join(' ')).toBe(disturbances);
      expect(Object.keys(machine.outputs ?? {}).join(' ')).toBe(outputs);
    },
  );

  describe.each(templates.map((template) => [template.id, template] as const))('%s', (_, template) => {
    const { machine, parameters } = template;

    it('has matrices of one size', () => {
      const size = (isSecondOrder(machine) ? machine.coordinates : machine.states).length;
      const matrices = isSecondOrder(machine)
        ? [machine.mass, machine.damping, machine.stiffness]
        : [machine.dynamics, machine.descriptor ?? machine.dynamics];
      for (const matrix of matrices) expect(matrix.map((row) => row.length)).toEqual(Array(size).fill(size));
      const outputs: (readonly Scalar[] | undefined)[] = isSecondOrder(machine)
        ? Object.values(machine.outputs ?? {}).flatMap(({ position, velocity }) => [position, velocity])
        : Object.values(machine.outputs ?? {});
      const columns = [...Object.values(machine.inputs ?? {}), ...Object.values(machine.disturbances ?? {})];
      const rows = [...columns, ...outputs].filter((row) => row !== undefined);
      expect(rows.length).toBeGreaterThanOrEqual(3);
      for (const row of rows) expect(row).toHaveLength(size);
    });

    it('uses all of its parameters and nothing else', () => {
      const used = new Set<string>();
      for (const entry of entriesOf(machine))
        visitNames(parseExpression(String(entry)), (name) => used.add(name));
      expect([...used].filter((name) => !RESERVED_NAMES.has(name)).sort()).toEqual(
        parameters.map(({ id }) => id).sort(),
      );
    });

    it('starts from values in order, in known units', () => {
      for (const {
        unit,
        nominal,
        low = nominal,
        high = nominal,
        minimum = -Infinity,
        maximum = Infinity,
      } of parameters) {
        expect(findUnit(unit)).toBeDefined();
        expect(
          [minimum, low, nominal, high, maximum].every((value, i, all) => i === 0 || all[i - 1] <= value),
        ).toBe(true);
      }
    });

    it('has a symmetric, positive mass at its nominal values', () => {
      const matrix = isSecondOrder(machine) ? machine.mass : machine.descriptor;
      if (matrix === undefined) throw new Error('every template states its mass');
      const mass = numbers(matrix, nominalOf(template));
      mass.forEach((row, i) => row.forEach((entry, j) => expect(entry).toBe(mass[j][i])));
      expect(mass[0][0]).toBeGreaterThan(0);
      if (mass.length === 2) expect(determinant(mass)).toBeGreaterThan(0);
    });
  });
});

describe('the equations', () => {
  it('of the two-mass drive leave the pair free to travel and without inner force', () => {
    const values = { ...nominalOf(templateOf('two-mass-drive')), b: 0 };
    for (const matrix of [secondOrder('two-mass-drive').stiffness, secondOrder('two-mass-drive').damping]) {
      for (const [left, right] of numbers(matrix, values)) expect(left + right).toBe(0);
    }
  });

  it('of the balancing carrier follow from its energies', () => {
    const values = nominalOf(templateOf('balancing-carrier'));
    const { m, h, J, Mb, R } = values;
    const { mass, stiffness, inputs } = secondOrder('balancing-carrier');
    const [x, theta] = [0.7, -0.3];
    const quadratic = (matrix: number[][]) =>
      matrix[0][0] * x * x + (matrix[0][1] + matrix[1][0]) * x * theta + matrix[1][1] * theta * theta;
    const kinetic = Mb * x * x + m * (x + h * theta) ** 2 + J * theta * theta;
    expect(quadratic(numbers(mass, values))).toBeCloseTo(kinetic, 9);
    // Twice the potential energy m g h cos(theta), to second order.
    expect(quadratic(numbers(stiffness, values))).toBeCloseTo(-m * 9.80665 * h * theta * theta, 9);
    // The torque works on the turn of the wheel against the body.
    const [[onX, onTilt]] = numbers([inputs?.u ?? []], values);
    expect(onX * x + onTilt * theta).toBeCloseTo(x / R - theta, 12);
  });

  it('of the suspended cabin give the undamped modes 1.23824 and 11.13519 Hz', () => {
    // Recomputed figures for 240 and 36 kg on 16000 and 160000 N/m; data as in Hedrick & Butsuen 1990 (memory).
    const values = { m: 0, m0: 240, mu: 36, ks: 16000, cs: 0, kt: 160000 };
    const mass = numbers(secondOrder('suspended-cabin').mass, values);
    const stiffness = numbers(secondOrder('suspended-cabin').stiffness, values);
    const half = (mass[0][0] * stiffness[1][1] + mass[1][1] * stiffness[0][0]) / (2 * determinant(mass));
    const root = Math.sqrt(half * half - determinant(stiffness) / determinant(mass));
    expect(Math.sqrt(half - root) / (2 * Math.PI)).toBeCloseTo(1.23824, 5);
    expect(Math.sqrt(half + root) / (2 * Math.PI)).toBeCloseTo(11.13519, 5);
  });

  it('of the suspended cabin let the whole rise with the road', () => {
    const values = nominalOf(templateOf('suspended-cabin'));
    const { stiffness, disturbances } = secondOrder('suspended-cabin');
    const risen = numbers(stiffness, values).map(([left, right]) => left + right);
    expect(risen).toEqual(numbers([disturbances?.road ?? []], values)[0]);
  });

  it('of the single track have the largest pole at zero at the critical speed 39.01304 m/s', () => {
    // Axle distances exchanged, data from memory; the critical speed is derived: V² = l² cf cr / (m (cf lf − cr lr)).
    const at = (V: number) => ({
      m: 0,
      m0: 1573,
      J0: 2500,
      lf: 1.58,
      lr: 1.1,
      xp: 0,
      V,
      cf: 160000,
      cr: 160000,
    });
    const { dynamics } = singleTrackMachine();
    expect(determinant(numbers(dynamics, at(39.01303)))).toBeGreaterThan(0);
    expect(determinant(numbers(dynamics, at(39.01305)))).toBeLessThan(0);
  });

  it('of the single track agree with balances about the unladen centre of mass', () => {
    const values = nominalOf(templateOf('single-track'));
    const { m, m0, J0, lf, lr, xp, V, cf, cr } = values;
    const { descriptor, dynamics, inputs, disturbances } = singleTrackMachine();
    // Velocity of the unladen centre v0 = vy + e r; the payload at −xp moves sideways with v0 − xp r.
    const e = (m * xp) / (m0 + m);
    const inertia = [
      [m0 + m, -m * xp],
      [-m * xp, J0 + m * xp * xp],
    ];
    const balance = [
      [-(cf + cr) / V, -(cf * lf - cr * lr) / V - (m0 + m) * V],
      [-(cf * lf - cr * lr) / V, -(cf * lf * lf + cr * lr * lr) / V + m * xp * V],
    ];
    const shifted = ([[a, b], [c, d]]: number[][]) => [
      [a, a * e + b],
      [a * e + c, (a * e + c) * e + b * e + d],
    ];
    const close = (found: number[][], wanted: number[][]) =>
      found.flat().forEach((entry, i) => {
        expect(Math.abs(entry - wanted.flat()[i])).toBeLessThan(
          1e-9 * Math.max(...wanted.flat().map(Math.abs)),
        );
      });
    close(numbers(descriptor, values), shifted(inertia));
    close(numbers(dynamics, values), shifted(balance));
    close(numbers([inputs?.delta ?? []], values), [[cf, cf * lf + cf * e]]);
    close(numbers([disturbances?.sidewind ?? []], values), [[1, 0]]);
  });
});

describe('expandMachine', () => {
  it('writes a template out and leaves other machines alone', () => {
    expect(expandMachine({ template: 'two-mass-drive' })).toBe(templateOf('two-mass-drive').machine);
    const { machine } = templateOf('single-track');
    expect(expandMachine(machine)).toBe(machine);
  });
});

describe('checkTemplateParameters', () => {
  it('names what a template needs and the study does not declare', () => {
    expect(checkTemplateParameters({ template: 'mass-spring-damper' }, new Set(['m', 'm0', 'k']))).toEqual([
      { path: 'parameters', message: 'the template mass-spring-damper needs c (damping, N s/m)' },
    ]);
    expect(
      checkTemplateParameters({ template: 'mass-spring-damper' }, new Set(['m', 'm0', 'k', 'c'])),
    ).toEqual([]);
  });
});
