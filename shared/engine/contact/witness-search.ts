import type { SearchFamily } from './search-family';
import type { SearchedRequirement } from './searched-requirement';

/** A point of a family at which a requirement fails. */
export interface Witness {
  readonly objective: number;
  readonly coordinates: Float64Array;
}

/** Levels of the objective, between 0 and the limit, at which the corners are tried. */
const LEVELS = 6;
/** Most corners tried at a level. */
const MOST_CORNERS = 64;
const BISECTIONS = 26;
const REFINEMENT_ROUNDS = 4;
const PATTERN_STEPS = [0.5, 0.2, 0.05];
/** A witness from bisection sits in rounding noise: the reported one lies this much further out, relatively. */
const STEP_OUT = 1e-6;
/** A value up to this is not told from 0: a pole on the boundary, to be judged exactly. */
const NEAR_ZERO = 1e-9;

/** Finds failing points with a cheap test, without proving anything, and moves them to smaller objectives. */
export class WitnessSearch {
  private readonly point: Float64Array;

  constructor(
    private readonly problem: SearchedRequirement,
    private readonly family: SearchFamily,
  ) {
    this.point = new Float64Array(family.variables);
  }

  /** The value of the requirement at a coordinate vector and objective. */
  private value(objective: number, coordinates: Float64Array): number {
    this.family.placePoint(objective, coordinates, this.point);
    return this.problem.value(this.point);
  }

  /** Tries corners of the bands at a few objectives up to a limit, smallest first; then refines the first that fails. */
  coarse(limit: number, levels = LEVELS): Witness | undefined {
    const corners = this.corners();
    for (let level = 0; level <= levels; level++) {
      const objective = (level / levels) * limit;
      let worst = 0;
      let worstCorner: Float64Array | undefined;
      for (const corner of corners) {
        const value = this.value(objective, corner);
        if (value < worst) {
          worst = value;
          worstCorner = corner;
        }
      }
      if (worstCorner !== undefined) return this.refine({ objective, coordinates: worstCorner });
      // Where a limit is touched at the very end of the range only, nothing fails on the way there.
      const touching = objective === this.family.reach ? this.touching(objective, corners) : undefined;
      if (touching !== undefined) return { objective, coordinates: touching };
      if (limit === 0) break;
    }
    return undefined;
  }

  private touching(objective: number, corners: readonly Float64Array[]): Float64Array | undefined {
    return corners.find(
      (corner) =>
        this.value(objective, corner) <= NEAR_ZERO && this.problem.failsCertainly(this.point) !== undefined,
    );
  }

  /** Corners of the free coordinates and their middle; beyond MOST_CORNERS a fixed selection of them. */
  private corners(): Float64Array[] {
    const { free, variables } = this.family;
    const all = free.length <= 6;
    const count = all ? 1 << free.length : MOST_CORNERS;
    const corners = [new Float64Array(variables)];
    let state = 0x9e3779b9 | 0;
    for (let index = 0; index < count; index++) {
      const corner = new Float64Array(variables);
      free.forEach((variable, bit) => {
        if (!all) state = (Math.imul(state, 1664525) + 1013904223) | 0;
        const up = all ? ((index >> bit) & 1) === 1 : state < 0;
        corner[variable] = up ? 1 : -1;
      });
      corners.push(corner);
    }
    return corners;
  }

  /** Moves a failing point to a smaller objective: bisection along it, and a pattern search over the coordinates. */
  refine(start: Witness): Witness {
    let best: Witness = { objective: this.bisect(start), coordinates: start.coordinates };
    for (let round = 0; round < REFINEMENT_ROUNDS && best.objective > 0; round++) {
      const before = best.objective;
      best = this.improveByEnds(best);
      for (const step of PATTERN_STEPS) best = this.improveBySteps(best, step);
      if (!(best.objective < before * (1 - 1e-6))) break;
    }
    return best;
  }

  /** The smallest objective at which these coordinates still fail, to about 1e−8 of the start. */
  private bisect({ objective, coordinates }: Witness): number {
    if (objective === 0 || this.value(0, coordinates) < 0) return 0;
    let holds = 0;
    let fails = objective;
    for (let i = 0; i < BISECTIONS; i++) {
      const middle = 0.5 * (holds + fails);
      if (this.value(middle, coordinates) < 0) fails = middle;
      else holds = middle;
    }
    return fails;
  }

  private improveByEnds(witness: Witness): Witness {
    let best = witness;
    for (const variable of this.family.free) {
      for (const end of [-1, 1]) best = this.tryCoordinate(best, variable, end);
    }
    return best;
  }

  private improveBySteps(witness: Witness, step: number): Witness {
    let best = witness;
    for (const variable of this.family.free) {
      for (const offset of [-step, step]) {
        const target = Math.max(-1, Math.min(1, best.coordinates[variable] + offset));
        best = this.tryCoordinate(best, variable, target);
      }
    }
    return best;
  }

  private tryCoordinate(witness: Witness, variable: number, coordinate: number): Witness {
    if (witness.coordinates[variable] === coordinate) return witness;
    const coordinates = witness.coordinates.slice();
    coordinates[variable] = coordinate;
    // Only a clear gain is worth a bisection.
    const objective = witness.objective * (1 - 1e-7);
    if (!(this.value(objective, coordinates) < 0)) return witness;
    return { objective: this.bisect({ objective, coordinates }), coordinates };
  }

  /**
   * The witness a little further out, where failing is clear of rounding, certified by an exact count; undefined
   * where neither there nor at the witness itself a count certifies it.
   */
  certified(witness: Witness, snap: (point: Float64Array) => void): Float64Array | undefined {
    const { family, problem } = this;
    const point = new Float64Array(family.variables);
    // At objective 0 the point itself is what counts: the nominal payload fails somewhere in the other bands.
    for (const factor of witness.objective === 0 ? [0, 1e-3, 1] : [1, 1e-3, 0]) {
      const outward = witness.objective + factor * STEP_OUT * (family.gapAt(witness.objective) / 1e-3);
      if (outward > family.reach) continue;
      family.placePoint(outward, witness.coordinates, point);
      snap(point);
      if (problem.value(point) <= NEAR_ZERO && problem.failsCertainly(point) !== undefined) return point;
    }
    return undefined;
  }
}
