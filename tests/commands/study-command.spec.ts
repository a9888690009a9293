import { createHash } from 'node:crypto';
import { readFileSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { canonicalText, readStudy, type Result, resultSchema, type Study } from '../../shared/contracts';
import { exampleNames, examplePath, exampleStudy, exampleText, ROOT } from './support/example-studies';
import { type Outcome, runCommand } from './support/run-command';
import { analyseText } from './support/run-in-process';

const LIFT_TABLE = 'lift-table-long-column';
const HOIST = 'workshop-hoist';

/** The result of a run that must have succeeded, and must have written nothing but that result. */
function resultOf({ status, output, messages }: Outcome): Result {
  expect({ status, messages }).toEqual({ status: 0, messages: '' });
  expect(output.endsWith('}\n')).toBe(true);
  return resultSchema.parse(JSON.parse(output));
}

/** A result without what depends on the clock. */
function answers(result: Result) {
  const { work, ...rest } = result;
  return { ...rest, boxes: work.boxes };
}

/** A JSON value with its numbers to five digits. */
function rounded(value: unknown): unknown {
  return JSON.parse(
    JSON.stringify(value, (_, entry: unknown) =>
      typeof entry === 'number' ? Number(entry.toPrecision(5)) : entry,
    ),
  );
}

const fromFile = runCommand([examplePath(LIFT_TABLE)]);

describe('the study command', () => {
  it('writes one line of JSON to standard output and nothing else', () => {
    const result = resultOf(fromFile);
    expect(fromFile.output.trimEnd()).not.toContain('\n');
    expect(result.format).toBe('tareline-result');
    expect(result.bands).toEqual({ verdict: 'holds', proof: 'proved' });
    expect(result.map).toBeUndefined();
    expect(result.work.boxes).toBeGreaterThan(0);
    expect(result.work.milliseconds).toBeGreaterThan(0);
  });

  it('gives the same digits on every run, in a process of its own or not', () => {
    const again = runCommand([examplePath(LIFT_TABLE)]);
    expect(answers(resultOf(again))).toEqual(answers(resultOf(fromFile)));
    const { studyHash } = resultOf(fromFile);
    const here = resultSchema.parse(JSON.parse(JSON.stringify(analyseText(exampleText(LIFT_TABLE)))));
    expect(answers({ ...here, studyHash })).toEqual(answers(resultOf(fromFile)));
  });

  it('names the study by the hash of its canonical text', () => {
    const canonical = canonicalText(readStudy(exampleText(LIFT_TABLE)).study);
    const digest = createHash('sha256').update(canonical).digest('hex');
    expect(resultOf(fromFile).studyHash).toBe(`sha256:${digest}`);
  });

  it('reads standard input for -', () => {
    const minified = JSON.stringify(exampleStudy(LIFT_TABLE));
    const result = resultOf(runCommand(['-'], { input: minified }));
    expect(answers(result)).toEqual(answers(resultOf(fromFile)));
  });

  it('finds a file from where npm was started', () => {
    const path = examplePath(LIFT_TABLE);
    const outcome = runCommand([`${LIFT_TABLE}.json`], { startedIn: dirname(path) });
    expect(answers(resultOf(outcome))).toEqual(answers(resultOf(fromFile)));
  });

  it('indents with --pretty', () => {
    const pretty = runCommand([examplePath(LIFT_TABLE), '--pretty']);
    expect(answers(resultOf(pretty))).toEqual(answers(resultOf(fromFile)));
    expect(pretty.output).toBe(`${JSON.stringify(JSON.parse(pretty.output), null, 2)}\n`);
  });

  it('writes warnings to standard error and into the result', () => {
    const study = exampleStudy(LIFT_TABLE);
    const parameters = study.parameters.map((parameter) =>
      parameter.id === 'M' ? { ...parameter, unit: 'stone' } : parameter,
    );
    const outcome = runCommand(['-'], { input: JSON.stringify({ ...study, parameters }) });
    expect(outcome.status).toBe(0);
    expect(outcome.messages).toMatch(/^warning: parameters\[4\]\.unit: unknown unit "stone", .+\n$/);
    const { warnings } = resultSchema.parse(JSON.parse(outcome.output));
    expect(warnings).toEqual([expect.objectContaining({ path: 'parameters[4].unit' })]);
  });
});

describe('the README', () => {
  it('shows what the command says', () => {
    const text = readFileSync(join(ROOT, 'README.md'), 'utf8');
    const shown = /```json\n(.+?)```/s.exec(text)?.[1];
    const { bands, largestPayload } = resultOf(fromFile);
    expect(rounded(JSON.parse(shown ?? '{}'))).toEqual(rounded({ bands, largestPayload }));
  });

  it('has every example in its table', () => {
    const rows = readFileSync(join(ROOT, 'README.md'), 'utf8').matchAll(/^\| ([a-z-]+) +\| /gm);
    const named = [...rows]
      .map(([, name]) => name)
      .filter((name) => name.includes('-') && /[a-z]/.test(name));
    expect(named.sort()).toEqual([...exampleNames]);
  });
});

describe('--map', () => {
  const mapOf = (study: Study): NonNullable<Result['map']> => {
    const { map } = resultOf(runCommand(['-', '--map'], { input: JSON.stringify(study) }));
    if (map === undefined) throw new Error('the result has no map');
    return map;
  };

  it('adds the nodes of the study, both ends included', () => {
    const map = mapOf(exampleStudy(LIFT_TABLE));
    expect(map.measure).toBe('closest');
    expect([map.x.length, map.x[0], map.x[20], map.x[40]]).toEqual([41, 0, 450, 900]);
    // No range for y: the band, 120000 … 185000, widened by half its width on each side.
    expect([map.y.length, map.y[0], map.y[15], map.y[30]]).toEqual([31, 87500, 152500, 217500]);
    expect(map.values).toHaveLength(31);
    for (const row of map.values) {
      expect(row).toHaveLength(41);
      expect(row.every((value) => value !== null && Number.isFinite(value))).toBe(true);
    }
    // The bands hold, so every node within them keeps its distance.
    const within = map.values
      .filter((_, row) => map.y[row] >= 120000 && map.y[row] <= 185000)
      .flatMap((row) => row.filter((_, column) => map.x[column] >= 40 && map.x[column] <= 480));
    expect(within.length).toBeGreaterThan(200);
    expect(within.every((value) => value !== null && value > 1)).toBe(true);
  });

  it('has the nominal measures at the nominal node, rows along y', () => {
    const study = exampleStudy(LIFT_TABLE);
    const map = { ...study.map, x: 'm', y: 'k', columns: 3, rows: 5, others: 'nominal' as const };
    const ranges = { xFrom: 0, xTo: 600, yFrom: 50000, yTo: 250000 };
    const { nominal } = resultOf(fromFile);
    for (const measure of ['dampingRatio', 'decayRate', 'modulusMargin', 'phaseMargin'] as const) {
      const { x, y, values } = mapOf({ ...study, map: { ...map, ...ranges, measure } });
      expect([x[1], y[2]]).toEqual([300, 150000]);
      expect(values).toHaveLength(5);
      expect(values[0]).toHaveLength(3);
      expect(values[2][1]).toBeCloseTo(nominal[measure] ?? NaN, 9);
      expect(values[0][0]).not.toBe(values[4][0]);
    }
  });

  it('is in the units of its parameters', () => {
    const { x, y } = mapOf(exampleStudy('transfer-cart-digital'));
    expect([x[0], x[30]]).toEqual([0, 3.7]);
    expect([y[0], y[20]]).toEqual([1175, 2475]);
  });

  it('says that a map with the others anywhere is sampled', () => {
    const study = exampleStudy('suspended-seat');
    const small = { ...study, map: { x: 'm', y: 'tau', columns: 4, rows: 3, others: 'anywhere' as const } };
    const anywhere = mapOf({ ...small, map: { ...small.map, measure: 'dampingRatio' } });
    expect(anywhere).toMatchObject({ others: 'anywhere', proof: 'sampled' });
    const nominal = mapOf({ ...small, map: { ...small.map, measure: 'dampingRatio', others: 'nominal' } });
    expect(nominal.proof).toBeUndefined();
    anywhere.values.forEach((row, i) =>
      row.forEach((value, j) => expect(value).toBeLessThanOrEqual(nominal.values[i][j] ?? -Infinity)),
    );
  });
});

describe('--require', () => {
  it('leaves with 0 where the bands hold', () => {
    expect(answers(resultOf(runCommand([examplePath(LIFT_TABLE), '--require'])))).toEqual(
      answers(resultOf(fromFile)),
    );
  });

  it('leaves with 1 where they do not, and writes the result nevertheless', () => {
    const without = runCommand([examplePath(HOIST)]);
    const required = runCommand(['--require', examplePath(HOIST)]);
    expect(required.status).toBe(1);
    const result = resultSchema.parse(JSON.parse(required.output));
    expect(result.bands.verdict).toBe('fails');
    expect(answers(result)).toEqual(answers(resultOf(without)));
  });
});

describe('a wrong call', () => {
  it.each([
    ['no file', []],
    ['two files', [examplePath(LIFT_TABLE), examplePath(HOIST)]],
    ['an unknown option', [examplePath(LIFT_TABLE), '--verbose']],
  ])('%s: leaves with 2 and shows the usage', (_, words) => {
    const { status, output, messages } = runCommand(words);
    expect({ status, output }).toEqual({ status: 2, output: '' });
    expect(messages).toMatch(/usage: npm run --silent study -- FILE \[--map\] \[--pretty\] \[--require\]\n$/);
    expect(messages.trimEnd()).not.toContain('\n');
  });

  it.each([
    ['a file that is not there', 'examples/no-such-study.json'],
    ['a folder', 'examples'],
  ])('%s: leaves with 2 and names the file', (_, file) => {
    const { status, output, messages } = runCommand([file]);
    expect({ status, output }).toEqual({ status: 2, output: '' });
    expect(messages.startsWith(`${file}: cannot be read`)).toBe(true);
    expect(messages.trimEnd()).not.toContain('\n');
  });
});
