import { describe, expect, it } from 'vitest';
import { parseExpression, ProgramBuilder } from '../../expressions';
import { NodeConstants } from './node-constants';

describe('constant nodes', () => {
  it('have a value, others have none, also where the program has grown meanwhile', () => {
    const program = new ProgramBuilder();
    const write = (text: string): number =>
      program.expression(parseExpression(text), (name) => program.parameter(Number(name.slice(1))));
    const fixed = write('p0*2');
    const varying = write('p1+p0');
    const constants = new NodeConstants(program, [3, 5], [1]);
    expect(constants.valueOf(fixed)).toBe(6);
    expect(constants.valueOf(varying)).toBeUndefined();
    expect(constants.valueOf(program.zero)).toBe(0);
    const later = write('sqrt(p0*2+30)');
    const laterVarying = write('exp(p1)*p0');
    expect(constants.valueOf(later)).toBe(6);
    expect(constants.valueOf(laterVarying)).toBeUndefined();
    expect(new NodeConstants(program, [3, 0], []).valueOf(laterVarying)).toBe(3);
  });
});
