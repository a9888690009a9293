import { describe, expect, it } from 'vitest';
import { parseExpression, ProgramBuilder } from '../../expressions';
import { NominalValues } from './nominal-values';

describe('NominalValues', () => {
  it('follows a growing program and tells what varies', () => {
    const program = new ProgramBuilder();
    const nominal = new NominalValues(program, [3, 4], (parameter) => parameter === 1);
    const compile = (text: string) =>
      program.expression(parseExpression(text), (name) => program.parameter(name === 'a' ? 0 : 1));
    const constant = compile('sqrt(a^2 + 16) - 5/a');
    expect(nominal.constant(constant)).toBe(5 - 5 / 3);
    const varying = compile('-(a*b)');
    expect(nominal.constant(varying)).toBeUndefined();
    expect(nominal.value(varying)).toBe(-12);
    expect(nominal.isVarying(constant)).toBe(false);
  });
});
