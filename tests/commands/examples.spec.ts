import { describe, expect, it } from 'vitest';
import {
  readStudy,
  type Requirement,
  type Result,
  resultSchema,
  type Study,
  type Witness,
} from '../../shared/contracts';
import { expectedFigures, type ExpectedFigures } from './expected-figures';
import { exampleNames, exampleStudy, exampleText } from './support/example-studies';
import { analyseText } from './support/run-in-process';

/** Both sides of an answer may lie this far apart, of the larger of the value and the nominal. */
const WIDEST_GAP = 0.002;
/** The figures are kept with six digits. */
const KEPT = 5e-6;

const examples = exampleNames.map((name) => ({
  name,
  study: exampleStudy(name),
  result: analyseText(exampleText(name)),
  expected: expectedFigures[name],
}));

function number(value: unknown): number {
  if (typeof value !== 'number')
    throw new Error('an example has an expression where this test needs a number');
  return value;
}

function expectSides(
  answer: { provedTo: number | null; failsAt: number | null; requirement?: string },
  [provedTo, failsAt, requirement]: ExpectedFigures['largest'],
) {
  for (const [found, kept] of [
    [answer.provedTo, provedTo],
    [answer.failsAt, failsAt],
  ]) {
    if (kept === null || found === null) expect(found).toBe(kept);
    else expect(Math.abs(found - kept)).toBeLessThanOrEqual(KEPT * Math.abs(kept));
  }
  expect(answer.requirement).toBe(requirement);
}

/** The nominal answer with every parameter of a study fixed at a witness. */
function answerAt(study: Study, witness: Witness): Result['nominal'] {
  const parameters = study.parameters.map(({ id, unit, nominal }) => ({
    id,
    unit,
    nominal: witness[id] ?? nominal,
  }));
  const fixed = { ...study, parameters, payload: undefined, rating: undefined, map: undefined };
  return analyseText(JSON.stringify({ ...fixed, searchUpTo: undefined, searchDownTo: undefined })).nominal;
}

/** Least ratio of a measure to its limit over the requirements; negative where the loop is unstable. */
function distance(nominal: Result['nominal'], requirements: readonly Requirement[]): number {
  if (!nominal.stable) return -1;
  const ratios = requirements.map((requirement) => {
    if (requirement.measure === 'stability') return Infinity;
    const limit =
      typeof requirement.atLeast === 'number' ? requirement.atLeast : degreesIn(requirement.atLeast);
    switch (requirement.measure) {
      case 'gainMargin': {
        const { up, down } = nominal.gainMargin ?? { up: null, down: null };
        return Math.min(up ?? Infinity, down === null ? Infinity : 1 / down) / limit;
      }
      case 'decayRate':
      case 'dampingRatio':
      case 'phaseMargin':
      case 'modulusMargin':
        return (nominal[requirement.measure] ?? Infinity) / limit;
    }
  });
  return Math.min(...ratios);
}

/** The examples write angles as "40*pi/180". */
function degreesIn(text: string): number {
  const degrees = /^(\d+)\*pi\/180$/.exec(text)?.[1];
  return (number(degrees === undefined ? undefined : Number(degrees)) * Math.PI) / 180;
}

describe('the examples', () => {
  it('each have their figures kept', () => {
    expect(Object.keys(expectedFigures).sort()).toEqual([...exampleNames]);
    expect(exampleNames.length).toBeGreaterThanOrEqual(8);
  });

  it('show machines that hold, that just hold, and that fail at either end', () => {
    const kinds = examples.map(({ result, study }) => {
      const { verdict, witness } = result.bands;
      const payload = study.parameters.find(({ id }) => id === study.payload);
      const stretch = result.bandStretch?.provedTo ?? 0;
      if (verdict === 'holds') return stretch < 1.05 ? 'just holds' : 'holds';
      if (witness === undefined || payload === undefined) return verdict;
      return witness[payload.id] > number(payload.nominal) ? 'fails when heavy' : 'fails when light';
    });
    expect(kinds).toEqual(
      expect.arrayContaining(['holds', 'just holds', 'fails when heavy', 'fails when light']),
    );
    expect(examples.map(({ result }) => result.bands.proof)).toContain('sampled');
  });
});

describe.each(examples)('$name', ({ name, study, result, expected }) => {
  const payload = study.parameters.find(({ id }) => id === study.payload);
  const { largestPayload, smallestPayload, bandStretch, bands, nominal } = result;
  if (payload === undefined || !largestPayload || !smallestPayload || !bandStretch) {
    throw new Error(`${name} has no payload or no band`);
  }
  const middle = number(payload.nominal);
  const sides = [
    { answer: largestPayload, floor: middle },
    { answer: smallestPayload, floor: middle },
    { answer: bandStretch, floor: 0 },
  ];

  it('is read without a warning and answered in the format of the contract', () => {
    expect(readStudy(exampleText(name)).warnings).toEqual([]);
    expect(resultSchema.parse(result)).toEqual(result);
    expect(result.warnings).toBeUndefined();
  });

  it('keeps its main figures', () => {
    expect([bands.verdict, bands.proof]).toEqual([expected.verdict, expected.proof]);
    expectSides(largestPayload, expected.largest);
    expectSides(smallestPayload, expected.smallest);
    expectSides(bandStretch, expected.stretch);
    expect(result.rating?.plate).toBe(expected.plate);
  });

  it('leaves nothing undecided and at most 0.2 % between both sides', () => {
    expect(bands.verdict).not.toBe('undecided');
    for (const { answer, floor } of sides) {
      expect(answer.undecided).toBeUndefined();
      const { provedTo, failsAt } = answer;
      if (provedTo === null || failsAt === null) continue;
      expect(provedTo).not.toBe(failsAt);
      const size = Math.max(Math.abs(provedTo), Math.abs(failsAt), floor);
      expect(Math.abs(failsAt - provedTo)).toBeLessThanOrEqual(WIDEST_GAP * size);
    }
  });

  it('has a stable nominal point that meets every requirement', () => {
    expect(nominal.stable).toBe(true);
    expect(nominal.decayRate).toBeCloseTo(-Math.max(...nominal.poles.map(({ re }) => re)), 12);
    expect(nominal.poles.every(({ re, im }) => re < 0 && Number.isFinite(im))).toBe(true);
    expect(nominal.poles.reduce((sum, { im }) => sum + im, 0)).toBeCloseTo(0, 8);
    expect(distance(nominal, study.requirements)).toBeGreaterThan(1);
    expect(nominal.modulusMargin).toBeGreaterThan(0);
    expect(nominal.modulusMargin).toBeLessThanOrEqual(1);
  });

  it('has a verdict that fits the payload range and the stretch', () => {
    const low = number(payload.low);
    const high = number(payload.high);
    const covered =
      largestPayload.provedTo !== null &&
      smallestPayload.provedTo !== null &&
      largestPayload.provedTo >= high &&
      smallestPayload.provedTo <= low;
    expect(covered).toBe(bands.verdict === 'holds');
    expect((bandStretch.provedTo ?? 0) >= 1).toBe(bands.verdict === 'holds');
  });

  it('names failing points that fail, inside the bands where these do not grow', () => {
    for (const { answer } of sides) {
      if (answer.witness === undefined) continue;
      const { witness } = answer;
      expect(distance(answerAt(study, witness), study.requirements)).toBeLessThan(1);
      if (answer === bandStretch) continue;
      expect(witness[payload.id]).toBe(answer.failsAt);
      for (const { id, low, high } of study.parameters) {
        if (id === payload.id || low === undefined || high === undefined) continue;
        expect(witness[id]).toBeGreaterThanOrEqual(number(low));
        expect(witness[id]).toBeLessThanOrEqual(number(high));
      }
      const inside = { ...witness, [payload.id]: answer.provedTo ?? middle };
      if (answer.provedTo !== null) {
        expect(distance(answerAt(study, inside), study.requirements)).toBeGreaterThanOrEqual(1);
      }
    }
  });
});

describe('the rated lift table', () => {
  it('may carry a plate that every test allows, in whole steps', () => {
    const { rating, largestPayload } = analyseText(exampleText('lift-table-plate'));
    if (!rating || !largestPayload || rating.allowed === null || rating.plate === null) {
      throw new Error('the example has a rating');
    }
    expect(rating.limitedBy).toBe('dynamic');
    expect(rating.allowed).toBeCloseTo((largestPayload.provedTo ?? 0) / 1.1, 9);
    expect(rating.plate % 25).toBe(0);
    expect(rating.plate).toBeLessThanOrEqual(rating.allowed);
    expect(rating.plate + 25).toBeGreaterThan(rating.allowed);
  });
});

describe('the digital transfer cart', () => {
  it('is labelled as proved for the approximated delay', () => {
    const { delay } = analyseText(exampleText('transfer-cart-digital'));
    expect(delay?.approximated).toBe(true);
    expect(delay?.phaseShortfall).toBeGreaterThan(0);
    expect(delay?.phaseShortfall).toBeLessThan(0.1);
  });
});
