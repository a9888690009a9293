import { describe, expect, it } from 'vitest';
import { faultLines } from './support/run-in-process';
import { runCommand } from './support/run-command';
import { unusableStudies } from './unusable-studies';

const kinds = Object.entries(unusableStudies);
const alone = kinds.filter(([, { alone }]) => alone === true);

/** The JSON path that a line of standard error begins with. */
function pathOf(line: string): string {
  return line.slice(0, line.indexOf(': '));
}

describe('an unusable study', () => {
  it('comes in more than 25 kinds, a third of them tried with the command itself', () => {
    expect(kinds.length).toBeGreaterThan(25);
    expect(alone.length).toBeGreaterThan(kinds.length / 3);
  });

  it.each(kinds)('%s: one line per fault, each with its JSON path', (_, { text, paths, says }) => {
    const lines = faultLines(text);
    expect(lines.map(pathOf).sort()).toEqual([...paths].sort());
    expect(lines.some((line) => says.test(line))).toBe(true);
    for (const line of lines) {
      expect(line).not.toMatch(/\n|\bat .+:\d+:\d+|undefined|NaN|\[object/);
      expect(line.length).toBeLessThan(300);
    }
  });

  it.each(alone)('%s: the command leaves with 2 and writes nothing else', (_, { text }) => {
    const { status, output, messages } = runCommand(['-', '--map', '--require'], { input: text });
    expect({ status, output }).toEqual({ status: 2, output: '' });
    expect(messages).toBe(
      faultLines(text)
        .map((line) => `${line}\n`)
        .join(''),
    );
  });
});
