import type { Measure } from '../../contracts';
import type { Contact as AnyContact, TwoSided as AnyTwoSided } from './contact';
import { type BoxBudget, proveBox } from './prove-box';
import type { SearchFamily } from './search-family';
import type { ProvableRequirement } from './searched-requirement';
import { WitnessSearch } from './witness-search';

type Contact = AnyContact<ProvableRequirement>;
type TwoSided = AnyTwoSided<ProvableRequirement>;

/** Most boxes of one requirement's search; beyond it the answer is undecided. */
export const BOX_LIMIT = 20_000;

/** Least relative gain for which a search that stayed open goes on with a smaller box. */
const SMALLEST_GAIN = 0.02;

export interface SearchContext {
  /** Problems, cheapest first. */
  readonly problems: readonly ProvableRequirement[];
  /** Brings a point to one that can be written in the parameters' units. */
  readonly snap: (point: Float64Array) => void;
  /** Total of boxes, for the report. */
  readonly work: { boxes: number };
  readonly boxLimit: number;
}

/**
 * The smallest objective at which some requirement fails, two-sided. For each requirement in turn, with the bound
 * found so far as its limit: a witness first, then the proof of the box up to just below the witness; a better
 * witness found on the way starts the proof anew. Yields once per box.
 *
 * @param sliceAtZero proves or refutes objective 0 alone, where the witness lies within the gap of it
 */
export function* contactSearch(
  context: SearchContext,
  family: SearchFamily,
  sliceAtZero: SearchFamily | undefined,
): Generator<void, TwoSided> {
  let contact: Contact | undefined;
  let open: { objective: number; share: number; measure: Measure } | undefined;
  for (const problem of context.problems) {
    const limit = contact?.objective ?? family.reach;
    const witnesses = new WitnessSearch(problem, family);
    const coarse = witnesses.coarse(limit);
    const first = coarse && witnesses.certified(coarse, context.snap);
    if (first !== undefined)
      contact = better(contact, { objective: family.objectiveOf(first), point: first, problem });
    const budget: BoxBudget = { boxes: 0, limit: context.boxLimit };
    /** What is known to hold for this requirement after its box stayed open, and the next objective to try. */
    let kept: { objective: number; share: number } | undefined;
    let target = Infinity;
    for (;;) {
      const clip = contact === undefined ? family.reach : contact.objective - family.gapAt(contact.objective);
      const onSlice = clip < 0 || (clip === 0 && family.reach > 0);
      if (onSlice && sliceAtZero === undefined) break;
      const searched = onSlice && sliceAtZero !== undefined ? sliceAtZero : family;
      const aim = Math.max(0, Math.min(clip, target));
      const before = budget.boxes;
      const outcome = yield* proveBox(problem, searched, searched.rangesAt(aim), budget);
      context.work.boxes += budget.boxes - before;
      if (outcome.kind === 'contact') {
        contact = improved(context, family, problem, outcome.point, contact);
        if (contact.objective <= 0)
          return { provedTo: undefined, contact, openShare: undefined, openMeasure: undefined };
        continue;
      }
      if (outcome.kind === 'proved' && aim >= Math.max(0, clip)) {
        kept = undefined;
        break;
      }
      const reached = outcome.kind === 'proved' ? aim : onSlice ? 0 : outcome.objective;
      const share = outcome.kind === 'open' ? outcome.share : (kept?.share ?? 0);
      const gained = kept === undefined ? reached : reached - kept.objective;
      if (kept === undefined || reached > kept.objective) kept = { objective: reached, share };
      // A smaller box is expanded with smaller rounding errors and may prove more: go up from what holds.
      if (onSlice || family.reach === 0 || gained <= SMALLEST_GAIN * reached) break;
      target = Math.max(2 * reached, reached + 10 * family.gapAt(reached));
      if (target >= clip) target = 0.5 * (reached + clip);
      budget.limit = budget.boxes + Math.ceil(context.boxLimit / 4);
    }
    if (kept !== undefined && (open === undefined || kept.objective < open.objective)) {
      open = { ...kept, measure: problem.measure };
    }
  }
  return conclude(family, contact, open, sliceAtZero !== undefined);
}

function better(old: Contact | undefined, found: Contact): Contact {
  return old === undefined || found.objective < old.objective ? found : old;
}

/** A contact found in a box, refined; the point itself where refining finds nothing that a count certifies. */
function improved(
  context: SearchContext,
  family: SearchFamily,
  problem: ProvableRequirement,
  point: Float64Array,
  old: Contact | undefined,
): Contact {
  const witnesses = new WitnessSearch(problem, family);
  const coordinates = new Float64Array(family.variables);
  family.coordinatesOf(point, coordinates);
  const refined = witnesses.refine({ objective: family.objectiveOf(point), coordinates });
  const certified = witnesses.certified(refined, context.snap);
  const snapped = point.slice();
  context.snap(snapped);
  const itself = problem.failsCertainly(snapped) === undefined ? point : snapped;
  const own: Contact = { objective: family.objectiveOf(itself), point: itself, problem };
  const best =
    certified === undefined
      ? own
      : better(own, { objective: family.objectiveOf(certified), point: certified, problem });
  return better(old, best);
}

function conclude(
  family: SearchFamily,
  contact: Contact | undefined,
  open: { objective: number; share: number; measure: Measure } | undefined,
  zeroProved: boolean,
): TwoSided {
  if (contact !== undefined && contact.objective <= 0) {
    return { provedTo: undefined, contact, openShare: undefined, openMeasure: undefined };
  }
  const clip = contact === undefined ? family.reach : contact.objective - family.gapAt(contact.objective);
  const bound = Math.max(clip, zeroProved ? 0 : clip);
  // Without a failing point an open box leaves everything beyond it undecided, at objective 0 the whole verdict.
  if (open !== undefined && (contact === undefined || open.objective < bound)) {
    return {
      provedTo: Math.max(0, open.objective),
      contact,
      openShare: open.share,
      openMeasure: open.measure,
    };
  }
  return { provedTo: bound, contact, openShare: undefined, openMeasure: undefined };
}
