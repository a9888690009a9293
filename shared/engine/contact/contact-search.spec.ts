import { describe, expect, it } from 'vitest';
import { readStudyValue } from '../../contracts';
import { LoopModel } from '../analysis/loop-model';
import { searchSpace } from '../analysis/search-variables';
import { composeStudy } from '../study';
import { contactSearch } from './contact-search';
import { proveBox } from './prove-box';
import { bandsFamily, payloadFamily, sliceFamily } from './search-family';
import type { ProvableRequirement } from './searched-requirement';

/** Mass with PID: m s³ + (c + 40) s² + (100 + 400) s + ki, stable iff m < (c + 40) · 500/ki (Routh 1877). */
function massWithPid(requirement: object, mass = 'm'): object {
  return {
    format: 'tareline-study',
    version: 1,
    machine: {
      coordinates: ['q'],
      mass: [[mass]],
      damping: [['c']],
      stiffness: [['100']],
      inputs: { u: ['1'] },
      outputs: { q: { position: ['1'] } },
    },
    parameters: [
      { id: 'm', nominal: 5, low: 1, high: 8, minimum: 0 },
      { id: 'c', nominal: 2, low: 1, high: 3, minimum: 0 },
    ],
    payload: 'm',
    control: { law: 'pid', input: 'u', output: 'q', kp: 400, ki: 2000, kd: 40 },
    requirements: [{ measure: 'stability' }, requirement],
  };
}

function setUp(requirement: { measure: string; atLeast?: number }, mass?: string) {
  const study = composeStudy(readStudyValue(massWithPid(requirement, mass)).study);
  const space = searchSpace(study);
  const model = new LoopModel(study, space);
  const found = study.requirements.find(({ measure }) => measure === requirement.measure);
  const problem = found && model.problem(found, [100, 10]);
  if (problem === undefined) throw new Error('the loop is rational');
  return { study, space, problem };
}

function finish<T>(course: Generator<void, T>): { value: T; steps: number } {
  for (let steps = 0; ; steps++) {
    const { done, value } = course.next();
    if (done === true) return { value, steps };
  }
}

const context = (problem: ProvableRequirement, boxLimit = 20_000) => ({
  problems: [problem],
  snap: () => undefined,
  work: { boxes: 0 },
  boxLimit,
});

describe('contact search', () => {
  it('brackets the largest mass of a PID loop within the gap, at the low end of the damping', () => {
    const { space, problem } = setUp({ measure: 'stability' });
    const family = payloadFamily(space.variables, 0, 100);
    const { value } = finish(contactSearch(context(problem), family, sliceFamily(space.variables, 0)));
    const limit = (41 * 500) / 2000;
    expect(5 + (value.provedTo ?? NaN)).toBeLessThanOrEqual(limit);
    expect(value.contact?.point[0]).toBeGreaterThan(limit);
    expect(value.contact?.point[0]).toBeLessThan(limit * 1.00001);
    expect(value.contact?.point[1]).toBe(1);
    expect((value.contact?.objective ?? NaN) - (value.provedTo ?? NaN)).toBeLessThanOrEqual(0.002 * limit);
  });

  it('proves a box without a failing point and finds one in a box that has it', () => {
    const { space, problem } = setUp({ measure: 'stability' });
    const bands = bandsFamily(space.variables);
    const budget = { boxes: 0, limit: 1000 };
    const holds = finish(proveBox(problem, bands, bands.rangesAt(0), budget));
    expect(holds.value.kind).toBe('proved');
    const wide = [
      { low: 1, high: 11 },
      { low: 1, high: 3 },
    ];
    const fails = finish(proveBox(problem, bands, wide, { boxes: 0, limit: 1000 })).value;
    expect(fails.kind).toBe('contact');
    if (fails.kind === 'contact') expect(fails.point[0] * 2000).toBeGreaterThan((fails.point[1] + 40) * 500);
  });

  it('ends undecided, and bounded by what is still open, when the boxes run out', () => {
    // Damping that only touches zero at m = 6: nothing fails strictly, nothing can be proved beyond.
    const study = composeStudy(
      readStudyValue({
        format: 'tareline-study',
        version: 1,
        machine: {
          coordinates: ['q'],
          mass: [['m']],
          damping: [['(m-6)^2*c']],
          stiffness: [['100']],
        },
        parameters: [
          { id: 'm', nominal: 2, low: 1, high: 8 },
          { id: 'c', nominal: 2, low: 1, high: 3 },
        ],
        payload: 'm',
        requirements: [{ measure: 'stability' }],
      }).study,
    );
    const space = searchSpace(study);
    const problem = new LoopModel(study, space).problem(study.requirements[0], [100, 10]);
    if (problem === undefined) throw new Error('the loop is rational');
    const family = payloadFamily(space.variables, 0, 100);
    const { value } = finish(contactSearch(context(problem, 500), family, sliceFamily(space.variables, 0)));
    expect(value.contact).toBeUndefined();
    expect(value.openShare).toBeGreaterThan(0);
    expect(2 + (value.provedTo ?? NaN)).toBeLessThanOrEqual(6);
    expect(2 + (value.provedTo ?? NaN)).toBeGreaterThan(5.9);
  });

  it('takes one step per box and the same steps every time', () => {
    const first = setUp({ measure: 'modulusMargin', atLeast: 0.5 });
    const second = setUp({ measure: 'modulusMargin', atLeast: 0.5 });
    const run = ({ space, problem }: ReturnType<typeof setUp>) => {
      const family = payloadFamily(space.variables, 0, 100);
      const own = context(problem);
      const { value, steps } = finish(contactSearch(own, family, sliceFamily(space.variables, 0)));
      return { provedTo: value.provedTo, point: value.contact?.point, steps, boxes: own.work.boxes };
    };
    const result = run(first);
    expect(run(second)).toEqual(result);
    expect(result.boxes).toBeGreaterThanOrEqual(result.steps);
    expect(result.steps).toBeGreaterThan(3);
  });
});

describe('certificates at points', () => {
  it.each([
    ['stability', undefined, 10.2, 10.3],
    ['decayRate', 1, 3, 8],
  ] as const)('%s', (measure, atLeast, inside, outside) => {
    const { problem } = setUp({ measure, atLeast });
    expect(problem.isInside([inside, 1])).toBe(true);
    expect(problem.failsCertainly([inside, 1])).toBeUndefined();
    expect(problem.isInside([outside, 1])).toBe(false);
    expect(problem.failsCertainly([outside, 1])).toEqual({ throughInfinity: false });
  });

  // Margins of the same loop in m: the gain margin downwards is κ with m = (c + 40κ)(100 + 400κ)/(2000κ).
  it('certifies a gain margin that is not kept and none that is', () => {
    const lower = ((1 + 40 / 2) * (100 + 400 / 2)) / (2000 / 2);
    const { problem } = setUp({ measure: 'gainMargin', atLeast: 2 });
    expect(problem.failsCertainly([lower * 1.001, 1])).toBeDefined();
    expect(problem.failsCertainly([lower * 0.999, 1])).toBeUndefined();
  });

  it.each(['phaseMargin', 'modulusMargin'] as const)(
    'certifies a %s on both sides of its value',
    (measure) => {
      const point = [4, 1];
      const { problem } = setUp({ measure, atLeast: 0.5 });
      const margin = (problem.value(point) + 1) * 0.5;
      expect(margin).toBeGreaterThan(0.05);
      expect(setUp({ measure, atLeast: margin * 1.0001 }).problem.failsCertainly(point)).toBeDefined();
      expect(setUp({ measure, atLeast: margin * 0.9999 }).problem.failsCertainly(point)).toBeUndefined();
    },
  );

  it('tells a pole that leaves through infinity', () => {
    const { problem } = setUp({ measure: 'stability' }, 'm-9');
    expect(problem.failsCertainly([9, 1])).toEqual({ throughInfinity: true });
  });
});
