import { afterAll, describe, expect, it } from 'vitest';
import { ProjectOnPaper } from './project-on-paper';

const project = new ProjectOnPaper([]);
afterAll(() => project.discard());

const places = ['shared/engine/measures/damping.ts', 'shared/expressions/evaluate.ts'];

describe.each(places)('arithmetic in %s', (file) => {
  it.each([
    ['export const y = Math.sin(1);', 'no-restricted-properties'],
    ['export const y = Math.pow(2, 3);', 'no-restricted-properties'],
    ['export const y = Math.hypot(3, 4);', 'no-restricted-properties'],
    ['export const y = Math.random();', 'no-restricted-properties'],
    ['export const { exp } = Math;', 'no-restricted-properties'],
    ['export const y = (x: number) => x ** 2;', 'no-restricted-syntax'],
    ['export let y = 2;\ny **= 3;', 'no-restricted-syntax'],
    ['export const M = Math;', 'no-restricted-syntax'],
    ["export const y = (f: 'sin') => Math[f](1);", 'no-restricted-syntax'],
    ['export const y = Date.now();', 'no-restricted-globals'],
  ])('refuses %s', async (text, rule) => {
    expect(await project.brokenRules(file, `${text}\n`)).toContain(rule);
  });

  it.each(['sqrt(2)', 'abs(-1)', 'min(1, 2)', 'floor(1.5)', 'imul(3, 4)', 'fround(0.1)', 'PI'])(
    'accepts Math.%s',
    async (call) => {
      expect(await project.brokenRules(file, `export const y = Math.${call} * 2 - 1 / 3;\n`)).toEqual([]);
    },
  );
});

it('leaves specs and other folders free to compare with Math', async () => {
  const text = 'export const y = Math.sin(1) ** 2;\n';
  expect(await project.brokenRules('shared/engine/measures/damping.spec.ts', text)).toEqual([]);
  expect(await project.brokenRules('server/platform/clock.ts', text)).toEqual([]);
});

describe('code made from text', () => {
  it.each([
    ["export const y: unknown = eval('1');", 'no-eval'],
    ["export const y = new Function('return 1');", 'no-new-func'],
    ["export const y = Function('return 1');", 'no-new-func'],
    ["/* eslint-disable no-eval */\nexport const y: unknown = eval('1');", 'no-eval'],
  ])('is refused: %s', async (text, rule) => {
    for (const file of [
      'shared/expressions/program.ts',
      'server/platform/log.ts',
      'tests/reference/cart.spec.ts',
    ]) {
      expect(await project.brokenRules(file, `${text}\n`)).toContain(rule);
    }
  });
});
