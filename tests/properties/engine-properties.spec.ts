import { describe, expect, it } from 'vitest';
import { StudyFaultError, type Result } from '../../shared/contracts';
import { analyseValue } from './support/analyse-value';
import { randomStudy } from './support/random-study';
import { reversed, widened } from './support/reshaped-study';
import { studyJson } from './support/study-json';
import type { StudyModel } from './support/study-model';
import { TEMPLATE_PAIRS } from './support/template-pairs';

const SEEDS = Array.from({ length: 40 }, (_, i) => 7001 + i);

const resultOf = (model: StudyModel): Result => analyseValue(studyJson(model));

const ANSWERS = ['largestPayload', 'smallestPayload', 'bandStretch'] as const;

/** Two answers to the same question contradict each other where one proves what the other has failing. */
function contradictions(first: Result, second: Result): string[] {
  const found: string[] = [];
  if (new Set([first.bands.verdict, second.bands.verdict]).size > 1) {
    const verdicts = [first.bands.verdict, second.bands.verdict];
    if (!verdicts.includes('undecided')) found.push(`bands: ${verdicts.join(', ')}`);
  }
  for (const key of ANSWERS) {
    const sign = key === 'smallestPayload' ? -1 : 1;
    for (const [one, other] of [
      [first[key], second[key]],
      [second[key], first[key]],
    ]) {
      const proved = one?.provedTo ?? null;
      const fails = other?.failsAt ?? null;
      if (proved !== null && fails !== null && sign * (proved - fails) >= 0) {
        found.push(`${key}: proved to ${proved}, fails at ${fails}`);
      }
    }
  }
  return found;
}

describe('a larger band', () => {
  it('never turns "fails" into "holds" and never proves what failed in the smaller one', () => {
    const faults: string[] = [];
    let compared = 0;
    for (const seed of SEEDS) {
      const model = randomStudy(seed);
      let wide: Result;
      try {
        wide = resultOf(widened(model, 1.4));
      } catch (error) {
        // A wider band may reach a point where the machine is not defined: then nothing is claimed.
        if (error instanceof StudyFaultError) continue;
        throw error;
      }
      const narrow = resultOf(model);
      compared++;
      if (narrow.bands.verdict === 'fails' && wide.bands.verdict === 'holds') faults.push(`${seed}: bands`);
      for (const key of ['largestPayload', 'smallestPayload'] as const) {
        const sign = key === 'smallestPayload' ? -1 : 1;
        const proved = wide[key]?.provedTo ?? null;
        const fails = narrow[key]?.failsAt ?? null;
        if (proved !== null && fails !== null && sign * (proved - fails) >= 0) faults.push(`${seed}: ${key}`);
      }
      const stretched = wide.bandStretch?.provedTo ?? null;
      const failing = narrow.bandStretch?.failsAt ?? null;
      // Factors compare where every band is wider by the same one: none of use, none cut short by a physical end.
      const comparable = model.parameters.every(
        ({ kind, nominal, low, high, minimum, maximum }, i) =>
          (kind !== 'use' || i === model.payload) &&
          nominal - 1.4 * (nominal - low) >= (minimum ?? -Infinity) &&
          nominal + 1.4 * (high - nominal) <= (maximum ?? Infinity),
      );
      if (comparable && stretched !== null && failing !== null && stretched * 1.4 > failing * (1 + 1e-9)) {
        faults.push(`${seed}: bandStretch ${stretched}, ${failing}`);
      }
    }
    expect(faults).toEqual([]);
    expect(compared).toBeGreaterThan(30);
  }, 60_000);
});

describe('the order of coordinates and parameters', () => {
  it('changes no two-sided answer beyond its gap', () => {
    const faults = SEEDS.flatMap((seed) => {
      const model = randomStudy(seed);
      return contradictions(resultOf(model), resultOf(reversed(model))).map(
        (fault) => `seed ${seed}: ${fault}`,
      );
    });
    expect(faults).toEqual([]);
  }, 60_000);
});

describe('the units of a study', () => {
  const parameters: { id: string; unit: string; kind?: string; values: Record<string, number> }[] = [
    { id: 'm', unit: 'kg', kind: 'use', values: { nominal: 300, low: 40, high: 480, minimum: 0 } },
    { id: 'k', unit: 'N/m', values: { nominal: 150000, low: 120000, high: 185000 } },
    { id: 'tau', unit: 's', values: { nominal: 0.008, low: 0.005, high: 0.011, minimum: 0.001 } },
    { id: 'h', unit: 'm', values: { nominal: 0.5, low: 0.45, high: 0.55 } },
  ];
  const inUnits = (units: Record<string, [string, number]>, searchUpTo: number): Result =>
    analyseValue({
      format: 'tareline-study',
      version: 1,
      machine: {
        coordinates: ['q1', 'q2'],
        mass: [
          [180, 0],
          [0, '120 + m*(0.5 + h)'],
        ],
        damping: [
          [620, -620],
          [-620, 620],
        ],
        stiffness: [
          ['k', '-k'],
          ['-k', 'k'],
        ],
        inputs: { u: [1, 0] },
        outputs: { drive: { position: [1, 0] } },
      },
      parameters: parameters.map(({ id, unit, values, ...rest }) => {
        const [ownUnit, perSi] = units[id] ?? [unit, 1];
        const own = Object.entries(values).map(([key, value]) => [
          key,
          Number((value * perSi).toPrecision(12)),
        ]);
        return { id, unit: ownUnit, ...rest, ...(Object.fromEntries(own) as Record<string, number>) };
      }),
      payload: 'm',
      searchUpTo,
      control: {
        law: 'pid',
        input: 'u',
        output: 'drive',
        kp: 9400,
        ki: 11000,
        kd: 4100,
        derivativeTime: 0.002,
      },
      actuator: { lag: 'tau' },
      requirements: [
        { measure: 'dampingRatio', atLeast: 0.12 },
        { measure: 'modulusMargin', atLeast: 0.5 },
      ],
    });

  it('change no answer beyond rounding', () => {
    const si = inUnits({}, 2400);
    const other = inUnits({ m: ['t', 0.001], k: ['kN/m', 0.001], tau: ['ms', 1000], h: ['mm', 1000] }, 2.4);
    expect(other.bands.verdict).toBe(si.bands.verdict);
    for (const key of ['provedTo', 'failsAt'] as const) {
      expect(other.largestPayload?.[key]).toBeCloseTo((si.largestPayload?.[key] ?? NaN) / 1000, 9);
      expect(other.bandStretch?.[key]).toBeCloseTo(si.bandStretch?.[key] ?? NaN, 9);
    }
    expect(other.largestPayload?.requirement).toBe(si.largestPayload?.requirement);
    expect(other.nominal).toEqual(si.nominal);
  });
});

describe('a template', () => {
  it.each(TEMPLATE_PAIRS)('has the loop of its machine written out by hand: $template', (pair) => {
    const { template, parameters, control, handControl, requirements, machine } = pair;
    const study = { format: 'tareline-study', version: 1, parameters, payload: 'm', requirements };
    const ours = analyseValue({ ...study, machine: { template }, control });
    const byHand = analyseValue({ ...study, machine, control: handControl ?? control });
    expect(ours.nominal.stable).toBe(true);
    expect(ours.nominal.poles).toHaveLength(byHand.nominal.poles.length);
    ours.nominal.poles.forEach(({ re, im }, i) => {
      const size = Math.hypot(re, im);
      const pole = byHand.nominal.poles[i];
      expect(Math.hypot(pole.re - re, pole.im - im)).toBeLessThan(1e-9 * size);
    });
    expect(contradictions(ours, byHand)).toEqual([]);
    for (const key of ANSWERS) {
      expect(byHand[key]?.requirement).toBe(ours[key]?.requirement);
      expect(byHand[key]?.failsAt === null).toBe(ours[key]?.failsAt === null);
    }
  });
});
