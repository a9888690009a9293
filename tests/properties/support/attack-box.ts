import { directPoint, noise, requirementsOf, slack } from './direct-requirements';
import type { SeededRandom } from './seeded-random';
import { type ModelRequirement, nominalValues, type StudyModel } from './study-model';

/** A box of parameter values that an answer claims to be free of failing points. */
export interface ClaimedBox {
  readonly claim: string;
  readonly low: Float64Array;
  readonly high: Float64Array;
}

export interface FoundFailure {
  readonly claim: string;
  readonly requirement: ModelRequirement;
  readonly values: number[];
  readonly slack: number;
  readonly noise: number;
}

export interface AttackEffort {
  readonly samples: number;
  /** Worst samples that a descent starts from, and the evaluations it may use. */
  readonly starts: number;
  readonly steps: number;
}

interface Look {
  readonly at: Float64Array;
  /** The least slack over the requirements, in units of the nominal slack. */
  readonly worst: number;
}

/** Looks for points of a claimed box where a requirement fails: random points, its faces, then descents from the worst. */
export class BoxAttack {
  readonly failures: FoundFailure[] = [];
  private readonly requirements: readonly ModelRequirement[];
  private readonly rate: number;
  private readonly units: number[];

  constructor(
    private readonly model: StudyModel,
    private readonly random: SeededRandom,
    private readonly effort: AttackEffort,
  ) {
    this.requirements = requirementsOf(model);
    const nominal = directPoint(model, nominalValues(model));
    this.rate = Math.max(Math.abs(nominal?.decayRate ?? 1), 1e-9 * (nominal?.scale ?? 1));
    this.units = this.requirements.map((requirement) =>
      Math.max(Math.abs(slack(model, requirement, nominal, this.rate)), 1e-6),
    );
  }

  attack(box: ClaimedBox): void {
    const { random, effort } = this;
    const wide = Array.from(box.low, (_, i) => i).filter((i) => box.low[i] < box.high[i]);
    const looks: Look[] = [];
    const fraction = new Float64Array(box.low.length);
    const count = wide.length === 0 ? 1 : effort.samples;
    for (let sample = 0; sample < count; sample++) {
      // A third inside, a third on faces, a third at corners or next to them.
      const toEnds = sample % 3 === 0 ? 0 : sample % 3 === 1 ? 0.5 : 0.95;
      for (const i of wide) fraction[i] = random.chance(toEnds) ? random.integer(0, 1) : random.next();
      looks.push(this.look(box, fraction));
    }
    if (wide.length === 0) return;
    looks.sort((a, b) => a.worst - b.worst);
    for (const start of looks.slice(0, effort.starts)) this.descend(box, wide, start);
  }

  private look(box: ClaimedBox, fraction: Float64Array): Look {
    const { model, requirements, rate, units } = this;
    const values = box.low.map((low, i) => Math.min(box.high[i], low + fraction[i] * (box.high[i] - low)));
    const point = directPoint(model, values);
    let worst = Infinity;
    requirements.forEach((requirement, k) => {
      const kept = slack(model, requirement, point, rate);
      worst = Math.min(worst, kept / units[k]);
      const tolerance = noise(requirement, point, rate);
      if (kept < -tolerance || Number.isNaN(kept)) {
        this.failures.push({
          claim: box.claim,
          requirement,
          values: [...values],
          slack: kept,
          noise: tolerance,
        });
      }
    });
    return { at: fraction.slice(), worst };
  }

  /** Pattern search: one coordinate at a time or all at once, with steps that shrink where nothing is gained. */
  private descend(box: ClaimedBox, wide: readonly number[], start: Look): void {
    const { random, effort } = this;
    let best = start;
    let step = 0.1;
    for (let used = 0; used < effort.steps && step > 1e-7;) {
      let gained = false;
      for (let direction = 0; direction <= 2 * wide.length; direction++) {
        const trial = best.at.slice();
        if (direction === 2 * wide.length) {
          for (const i of wide) trial[i] = clamp(trial[i] + step * random.between(-1, 1));
        } else {
          const i = wide[direction >> 1];
          trial[i] = clamp(trial[i] + (direction % 2 === 0 ? step : -step));
          if (trial[i] === best.at[i]) continue;
        }
        used++;
        const seen = this.look(box, trial);
        if (seen.worst < best.worst) {
          best = seen;
          gained = true;
        }
      }
      step *= gained ? 1.5 : 0.35;
    }
  }
}

const clamp = (fraction: number): number => Math.max(0, Math.min(1, fraction));
