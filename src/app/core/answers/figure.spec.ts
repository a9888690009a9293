import { describe, expect, it } from 'vitest';
import { failsAbove, failsBelow, plainFigure, provedFrom, provedTo, reserveFigure, withUnit } from './figure';

describe('figures', () => {
  it('round a proved range inwards and failing values outwards', () => {
    expect(provedTo(602.8528925134837)).toBe('602.8');
    expect(provedFrom(52.38461846912408)).toBe('52.39');
    expect(failsAbove(603.456348862346)).toBe('603.5');
    expect(failsBelow(52.30461846912408)).toBe('52.3');
  });

  it('never show more reserve than there is', () => {
    expect(reserveFigure(123.96)).toBe('+123');
    expect(reserveFigure(-45.02)).toBe('\u221245.1');
    expect(reserveFigure(0)).toBe('0');
  });

  it('keep a unit beside its figure', () => {
    expect(withUnit('480', 'kg')).toBe('480\u2009kg');
    expect(withUnit('1.38', null)).toBe('1.38');
  });

  it('write plain numbers with few digits', () => {
    expect(plainFigure(2.442393223948107)).toBe('2.442');
    expect(plainFigure(-120000)).toBe('\u2212120000');
    expect(plainFigure(1e-11)).toBe('1\u00a0×\u00a010⁻¹¹');
  });
});
