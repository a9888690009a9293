import { directLoop } from './direct-loop';
import { DirectMargins, type Margins } from './direct-margins';
import { directPoles, type Poles } from './direct-poles';
import { type ModelRequirement, siValues, type StudyModel } from './study-model';

export interface DirectPoint {
  readonly closed: Poles;
  readonly decayRate: number;
  readonly dampingRatio: number;
  /** Largest modulus of a closed-loop pole: the scale of rounding in the poles. */
  readonly scale: number;
  /** Scanner and margins of one law's loop; undefined for an unstable or improper loop. */
  readonly scanner: (law: number) => DirectMargins | undefined;
  readonly margins: (law: number) => Margins | undefined;
}

/** Everything known at a point (values in the study's units); undefined where the loop is improper there. */
export function directPoint(model: StudyModel, values: ArrayLike<number>): DirectPoint | undefined {
  const loop = directLoop(model, siValues(model, values));
  const closed = loop && directPoles(loop, -1);
  if (loop === undefined || closed === undefined) return undefined;
  let decayRate = Infinity;
  let dampingRatio = 1;
  let scale = 0;
  const sizes = closed.re.map((re, i) => Math.hypot(re, closed.im[i]));
  for (const size of sizes) scale = Math.max(scale, size);
  for (let i = 0; i < closed.re.length; i++) {
    // A pole at 0 exactly comes out on either side of it.
    const size = sizes[i] < 1e-12 * scale ? 0 : sizes[i];
    if (size === 0) {
      decayRate = Math.min(decayRate, 0);
      dampingRatio = Math.min(dampingRatio, 0);
      continue;
    }
    decayRate = Math.min(decayRate, -closed.re[i]);
    dampingRatio = Math.min(dampingRatio, -closed.re[i] / size);
  }
  const scanners = new Map<number, DirectMargins | undefined>();
  const scanner = (law: number): DirectMargins | undefined => {
    if (!scanners.has(law)) {
      const broken = decayRate > 0 ? directPoles(loop, law) : undefined;
      scanners.set(law, broken && new DirectMargins(closed, broken));
    }
    return scanners.get(law);
  };
  const measured = new Map<number, Margins | undefined>();
  const margins = (law: number): Margins | undefined => {
    if (!measured.has(law)) measured.set(law, scanner(law)?.measure());
    return measured.get(law);
  };
  return { closed, decayRate, dampingRatio, scale, scanner, margins };
}

export const lawOf = (model: StudyModel, requirement: ModelRequirement): number =>
  'input' in requirement && requirement.input !== undefined
    ? model.laws.findIndex(({ input }) => input === requirement.input)
    : 0;

/**
 * How far a requirement is kept, negative where it fails: relative to the level for margins and damping, in 1/s over
 * `rate` for stability and decay rate.
 */
export function slack(
  model: StudyModel,
  requirement: ModelRequirement,
  point: DirectPoint | undefined,
  rate: number,
): number {
  if (point === undefined) return -1;
  const { decayRate, dampingRatio } = point;
  switch (requirement.measure) {
    case 'stability':
      return decayRate / rate;
    case 'decayRate':
      return (decayRate - requirement.atLeast) / rate;
    case 'dampingRatio':
      return dampingRatio - requirement.atLeast;
    default: {
      const margins = point.margins(lawOf(model, requirement));
      if (margins === undefined) return Math.max(-2, Math.min(0, decayRate / rate)) - 1;
      if (requirement.measure === 'gainMargin') {
        const factor = Math.min(margins.gainUp, 1 / margins.gainDown, 1000);
        return factor / requirement.atLeast - 1;
      }
      const measured = requirement.measure === 'phaseMargin' ? margins.phase : margins.modulus;
      return measured / requirement.atLeast - 1;
    }
  }
}

/** The requirements of a study, stability among them whether it is listed or not. */
export function requirementsOf(model: StudyModel): ModelRequirement[] {
  const others = model.requirements.filter(({ measure }) => measure !== 'stability');
  return [{ measure: 'stability' }, ...others];
}

/** What rounding may do to a slack at a point, generously: it is no failure if it is less than this. */
export function noise(requirement: ModelRequirement, point: DirectPoint | undefined, rate: number): number {
  if (point === undefined) return 0;
  switch (requirement.measure) {
    case 'stability':
    case 'decayRate':
      return (1e-9 * point.scale) / rate;
    case 'dampingRatio':
      return 1e-8;
    default:
      return 1e-6;
  }
}
