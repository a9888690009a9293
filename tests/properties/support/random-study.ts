import { directLoop } from './direct-loop';
import { type DirectPoint, directPoint } from './direct-requirements';
import { addHardware, type LawKind, randomLaw } from './random-control';
import * as families from './random-machine';
import { SeededRandom } from './seeded-random';
import { StudyDraft } from './study-draft';
import { type ModelRequirement, nominalValues, siValues, type StudyModel } from './study-model';

const FAMILIES: readonly families.MachineFamily[] = [
  families.chain,
  families.chain,
  families.firstOrderChain,
  families.balanced,
  families.flutter,
  families.general,
  families.pocket,
  families.lateral,
];

const LAWS: readonly LawKind[] = ['pid', 'pid', 'state-feedback', 'transfer-function', 'state-space'];

/** Order of the closed loop, as a rule, and now and then. */
const ORDERS = { least: 3, most: 8, mostOfAll: 12 };

const ATTEMPTS = 400;

/** The study of a seed: the first of its draws whose loop has the wanted order and keeps something at its nominal. */
export function randomStudy(seed: number): StudyModel {
  const random = new SeededRandom(seed);
  const unstableAllowed = random.chance(0.03);
  const most = random.chance(0.12) ? ORDERS.mostOfAll : ORDERS.most;
  for (let attempt = 0; attempt < ATTEMPTS; attempt++) {
    const model = draw(random, seed, most, unstableAllowed);
    if (model !== undefined) return model;
  }
  throw new Error(`no study was found for seed ${seed}`);
}

function draw(
  random: SeededRandom,
  seed: number,
  most: number,
  unstableAllowed: boolean,
): StudyModel | undefined {
  const draft = new StudyDraft(random);
  const made = random.pick(FAMILIES)(draft);
  const model: StudyModel = {
    name: `seed ${seed}`,
    machine: made.machine,
    parameters: draft.parameters,
    definitions: draft.definitions,
    payload: draft.payload,
    laws: [],
    actuators: [],
    requirements: [],
  };
  const kind = made.needsFeedback ? 'state-feedback' : random.pick(LAWS);
  model.laws = [randomLaw(draft, made, kind, model)];
  const bare = directLoop(model, siValues(model, nominalValues(model)));
  if (bare === undefined || bare.states > most) return undefined;
  addHardware(draft, model, made.frequency, most - bare.states);
  draft.placeBands(random.integer(1, 5), random.pick([0.05, 0.2, 0.5, 0.8]));
  addUnits(draft);
  addSearches(draft, model);
  const loop = directLoop(model, siValues(model, nominalValues(model)));
  const point = directPoint(model, nominalValues(model));
  if (loop === undefined || point === undefined || loop.states < ORDERS.least || loop.states > most)
    return undefined;
  if (!unstableAllowed && !(point.decayRate > 1e-6 * point.scale)) return undefined;
  model.requirements = randomRequirements(random, point);
  return model.requirements.length > 0 ? model : undefined;
}

/** Writes a few parameters in a unit of their own. */
function addUnits({ random, parameters, payload }: StudyDraft): void {
  parameters.forEach((parameter, index) => {
    if (!random.chance(0.12)) return;
    const [unit, siFactor] =
      index === payload
        ? ['t', 1000]
        : random.pick<[string, number]>([
            ['kN/m', 1000],
            ['ms', 0.001],
          ]);
    parameter.unit = unit;
    parameter.siFactor = siFactor;
    for (const key of ['nominal', 'low', 'high', 'minimum', 'maximum'] as const) {
      const value = parameter[key];
      if (value !== undefined) parameter[key] = siFactor < 1 ? value * 1000 : value / 1000;
    }
  });
}

function addSearches({ random, parameters, payload }: StudyDraft, model: StudyModel): void {
  if (payload === undefined) return;
  const { nominal, high, low, minimum } = parameters[payload];
  if (random.chance(0.5)) model.searchUpTo = Math.max(high, nominal * random.decade(0.05, 1.5));
  if (random.chance(0.3))
    model.searchDownTo = Math.max(minimum ?? 0, Math.min(low, nominal * random.decade(-2, -0.1)));
}

function randomRequirements(random: SeededRandom, point: DirectPoint): ModelRequirement[] {
  const share = random.chance(0.15) ? random.between(0.9, 0.999) : random.between(0.2, 0.9);
  const margins = point.margins(0);
  const of = {
    stability: (): ModelRequirement => ({ measure: 'stability' }),
    decayRate: (): ModelRequirement => ({
      measure: 'decayRate',
      atLeast: share * Math.max(point.decayRate, 0),
    }),
    dampingRatio: (): ModelRequirement => ({
      measure: 'dampingRatio',
      atLeast: Math.min(0.95, share * Math.max(0, point.dampingRatio)),
    }),
    gainMargin: (): ModelRequirement => {
      const factor = margins ? Math.min(margins.gainUp, 1 / margins.gainDown, 6) : 2;
      return { measure: 'gainMargin', atLeast: 1 + share * (factor - 1) };
    },
    phaseMargin: (): ModelRequirement => ({
      measure: 'phaseMargin',
      atLeast: share * Math.min(3, margins?.phase ?? 0.5),
    }),
    modulusMargin: (): ModelRequirement => ({
      measure: 'modulusMargin',
      atLeast: share * Math.min(1, margins?.modulus ?? 0.5),
    }),
  };
  const measures = Object.keys(of) as (keyof typeof of)[];
  const chosen = random.chance(0.6) ? [random.pick(measures)] : measures.filter(() => random.chance(0.4));
  return chosen.map((measure) => of[measure]());
}
