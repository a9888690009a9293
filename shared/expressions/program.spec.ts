import { describe, expect, it } from 'vitest';
import { parseExpression } from './parse';
import { dependentNodes, isBinary, ProgramBuilder } from './program';

/** Appends an expression in the parameters p0, p1, …. */
function append(program: ProgramBuilder, text: string): number {
  return program.expression(parseExpression(text), (name) => program.parameter(Number(name.slice(1))));
}

describe('program', () => {
  it('makes equal nodes once', () => {
    const program = new ProgramBuilder();
    const first = append(program, 'sin(p0*p1)+p0*p1');
    const size = program.operations.length;
    expect(append(program, 'sin(p0*p1)+p0*p1')).toBe(first);
    expect(program.operations).toHaveLength(size);
    // 0, 1, p0, p1, product, sine, sum
    expect(size).toBe(7);
    expect(append(program, 'p1*p0')).toBe(size);
  });

  it('tells constants apart by their exact value', () => {
    const program = new ProgramBuilder();
    expect(program.constant(0.1 + 0.2)).not.toBe(program.constant(0.3));
    expect(program.constant(0.3)).toBe(program.constant(0.3));
    expect(program.constant(1)).toBe(program.one);
  });

  it('has one zero, whatever its sign', () => {
    const program = new ProgramBuilder();
    expect(program.constant(-0)).toBe(program.zero);
    expect(program.negate(program.zero)).toBe(program.zero);
    expect(Object.is(program.constants[program.zero], 0)).toBe(true);
  });

  it('drops what changes nothing', () => {
    const program = new ProgramBuilder();
    const p = program.parameter(0);
    const { zero, one } = program;
    expect(program.add(p, zero)).toBe(p);
    expect(program.add(zero, p)).toBe(p);
    expect(program.subtract(p, zero)).toBe(p);
    expect(program.subtract(zero, p)).toBe(program.negate(p));
    expect(program.negate(program.negate(p))).toBe(p);
    expect(program.multiply(p, zero)).toBe(zero);
    expect(program.multiply(zero, p)).toBe(zero);
    expect(program.multiply(p, one)).toBe(p);
    expect(program.multiply(one, p)).toBe(p);
    expect(program.divide(p, one)).toBe(p);
    expect(program.power(p, one)).toBe(p);
    expect(program.negate(program.constant(2))).toBe(program.constant(-2));
    // Not dropped: 0 / p is undefined at p = 0, and so is 1 / p.
    expect(program.operations[program.divide(zero, p)]).toBe('divide');
    expect(program.operations[program.divide(one, p)]).toBe('divide');
  });

  it('puts operands before their node', () => {
    const program = new ProgramBuilder();
    append(program, '(p0-p1)^2/abs(p2)+exp(-p0)*sqrt(p1)-log(p2)*cos(p0)/tan(p1)');
    expect(new Set(program.operations).size).toBe(14);
    program.operations.forEach((operation, id) => {
      if (operation === 'constant' || operation === 'parameter') return;
      expect(program.left[id]).toBeLessThan(id);
      if (isBinary(operation)) expect(program.right[id]).toBeLessThan(id);
    });
  });

  it('resolves a name where it stands', () => {
    const program = new ProgramBuilder();
    const seen: [string, number][] = [];
    program.expression(parseExpression('a + 2*b - a'), (name, position) => {
      seen.push([name, position]);
      return program.one;
    });
    expect(seen).toEqual([
      ['a', 0],
      ['b', 6],
      ['a', 10],
    ]);
  });

  it('tells which nodes depend on a parameter', () => {
    const program = new ProgramBuilder();
    const free = append(program, 'p1*3+sin(p1)');
    const left = append(program, 'p0+p1');
    const right = append(program, 'p1-p0');
    const call = append(program, 'exp(p1*p0)');
    const constant = append(program, '2^3');
    const dependent = dependentNodes(program, (parameter) => parameter === 0);
    expect([free, left, right, call, constant].map((node) => dependent[node])).toEqual([
      false,
      true,
      true,
      true,
      false,
    ]);
    expect(dependentNodes(program, () => false)).not.toContain(true);
  });
});
