import type { SeededRandom } from './seeded-random';
import type { ModelParameter } from './study-model';
import { parameterTerm, type Term } from './term';

/** Parameters and definitions of a study that is being made up; bands are chosen when all quantities are known. */
export class StudyDraft {
  readonly parameters: ModelParameter[] = [];
  readonly definitions = new Map<string, string>();
  payload?: number;

  constructor(readonly random: SeededRandom) {}

  /** An exact parameter so far. */
  quantity(id: string, nominal: number): Term {
    const value = Number(nominal.toPrecision(this.random.integer(3, 9)));
    this.parameters.push({ id, siFactor: 1, nominal: value, low: value, high: value });
    return parameterTerm(id, this.parameters.length - 1);
  }

  payloadQuantity(nominal: number): Term {
    this.payload = this.parameters.length;
    return this.quantity('m', nominal);
  }

  /** Sometimes gives a term a name of its own under `definitions`. */
  named(id: string, term: Term): Term {
    if (!this.random.chance(0.4)) return term;
    this.definitions.set(id, term.text);
    return { text: id, at: term.at };
  }

  /** Gives bands to the payload, perhaps, and to others, at random. */
  placeBands(count: number, widest: number): void {
    const { random, parameters } = this;
    const order = parameters.map((_, index) => index).sort(() => random.next() - 0.5);
    const chosen = order.filter((index) => index !== this.payload).slice(0, count);
    if (this.payload !== undefined && random.chance(0.7)) {
      if (chosen.length >= count) chosen.pop();
      chosen.push(this.payload);
    }
    for (const index of chosen) this.placeBand(parameters[index], widest, index === this.payload);
  }

  private placeBand(parameter: ModelParameter, widest: number, payload: boolean): void {
    const { random } = this;
    const { nominal } = parameter;
    const size = Math.abs(nominal);
    const width = (): number => {
      const relative = random.chance(0.15) ? random.decade(-5, -2) : random.decade(-2, Math.log10(widest));
      return size * Math.min(relative, payload ? 0.95 : 0.8);
    };
    const side = random.integer(0, 9);
    parameter.low = side === 0 ? nominal : nominal - width();
    parameter.high = side === 1 ? nominal : nominal + width();
    if (random.chance(payload ? 0.6 : 0.5)) {
      parameter.minimum =
        parameter.low - random.next() * (payload ? parameter.low : 0.9 * Math.abs(parameter.low));
    }
    if (random.chance(0.25)) parameter.maximum = parameter.high + random.decade(-1, 1) * size;
    if (random.chance(0.2)) parameter.kind = random.pick(['use', 'wear', 'tolerance']);
  }
}
