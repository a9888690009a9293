import type { Contact, TwoSided } from './contact';
import { haltonPoint } from './low-discrepancy';
import type { SampledRequirement } from './sampled-requirement';
import type { SearchFamily } from './search-family';
import { WitnessSearch } from './witness-search';

/** Points of the low-discrepancy set that have to pass before a bound is reported. */
const SAMPLES = 3000;
/** Levels of the objective at which all corners are tried. */
const CORNER_LEVELS = 24;

/**
 * The two-sided search without a proof: corners of the bands at many objectives, then a low-discrepancy set of
 * points below the smallest failing objective found, each failing one refined, until a whole set passes.
 * Yields once per sample.
 */
export function* sampledSearch(
  problems: readonly SampledRequirement[],
  family: SearchFamily,
  snap: (point: Float64Array) => void,
  work: { boxes: number },
): Generator<void, TwoSided<SampledRequirement>> {
  let contact: Contact<SampledRequirement> | undefined;
  const fraction = new Float64Array(family.variables + 1);
  const coordinates = new Float64Array(family.variables);
  const point = new Float64Array(family.variables);
  for (const problem of problems) {
    const witnesses = new WitnessSearch(problem, family);
    const take = (objective: number, at: Float64Array): void => {
      const refined = witnesses.refine({ objective, coordinates: at });
      const certified = witnesses.certified(refined, snap) ?? point.slice();
      const found = family.objectiveOf(certified);
      if (contact === undefined || found < contact.objective)
        contact = { objective: found, point: certified, problem };
    };
    const coarse = witnesses.coarse(contact?.objective ?? family.reach, CORNER_LEVELS);
    if (coarse !== undefined) {
      family.placePoint(coarse.objective, coarse.coordinates, point);
      take(coarse.objective, coarse.coordinates);
    }
    for (let index = 1; index <= SAMPLES; index++) {
      haltonPoint(index, fraction);
      const limit =
        contact === undefined ? family.reach : contact.objective - family.gapAt(contact.objective);
      if (limit < 0) break;
      for (let i = 0; i < coordinates.length; i++) coordinates[i] = 2 * fraction[i + 1] - 1;
      const objective = fraction[0] * limit;
      family.placePoint(objective, coordinates, point);
      if (problem.value(point) < 0) {
        const before = contact?.objective;
        take(objective, coordinates.slice());
        // The set starts anew below the better witness.
        if (contact?.objective !== before) index = 0;
      }
      work.boxes++;
      yield;
    }
  }
  if (contact === undefined)
    return { provedTo: family.reach, contact, openShare: undefined, openMeasure: undefined };
  const bound =
    contact.objective <= 0 ? undefined : Math.max(0, contact.objective - family.gapAt(contact.objective));
  return { provedTo: bound, contact, openShare: undefined, openMeasure: undefined };
}
