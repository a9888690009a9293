import { closedMatrix } from './direct-poles';
import { directLoop } from './direct-loop';
import type { RandomMachine } from './random-machine';
import type { StudyDraft } from './study-draft';
import { type HardwareModel, type LawModel, nominalValues, siValues, type StudyModel } from './study-model';
import { constant, ONE, type Term } from './term';
import { solveInPlace } from './linear-solve';
import type { SeededRandom } from './seeded-random';

export type LawKind = LawModel['law'];

const rounded = (value: number): number => Number(value.toPrecision(6));

/** A law of a kind with gains of a plausible size; a state feedback places the poles of the machine at its nominal. */
export function randomLaw(
  draft: StudyDraft,
  made: RandomMachine,
  kind: LawKind,
  model: StudyModel,
): LawModel {
  const { random } = draft;
  const { stiffness, frequency, machine } = made;
  const input = 'u';
  const output = random.chance(0.8) ? 'y' : 'z';
  const sign = random.chance(0.85) ? 1 : -1;
  switch (kind) {
    case 'pid': {
      const kp = sign * stiffness * random.decade(-1.7, 0.7);
      const term = (id: string, value: number): Term =>
        random.chance(0.2) ? draft.quantity(id, value) : constant(rounded(value));
      return {
        law: 'pid',
        input,
        output,
        kp: term('kp', kp),
        ...(random.chance(0.6) && { ki: term('ki', kp * frequency * random.decade(-2, -0.2)) }),
        ...(random.chance(0.7) && {
          kd: term('kd', (kp / frequency) * random.decade(-1, 0.5)),
          ...(random.chance(0.8) && { derivativeTime: term('Td', random.decade(-2.3, -0.5) / frequency) }),
        }),
      };
    }
    case 'state-feedback': {
      const states =
        machine.order === 1
          ? [...machine.names]
          : [...machine.names, ...machine.names.map((name) => `${name}'`)];
      const gains =
        placedGains(model, random, frequency) ?? states.map(() => stiffness * random.between(0, 0.5));
      return {
        law: 'state-feedback',
        input,
        gains: states.map((state, i) => ({ state, gain: constant(rounded(gains[i])) })),
        ...(random.chance(0.4) && {
          integral: {
            output,
            gain: constant(rounded(sign * stiffness * frequency * random.decade(-2.5, -1))),
          },
        }),
      };
    }
    case 'transfer-function': {
      const gain = sign * stiffness * random.decade(-1.7, 0.5);
      const zero = frequency * random.decade(-0.5, 0.5);
      const pole = frequency * random.decade(0, 1.3);
      if (random.chance(0.4)) {
        const damping = random.between(0.3, 1);
        return {
          law: 'transfer-function',
          input,
          output,
          numerator: [gain, 2 * damping * zero * gain, gain * zero * zero].map(rounded).map(constant),
          denominator: [
            ONE,
            constant(rounded(pole)),
            random.chance(0.5) ? constant(0) : constant(rounded(pole * 0.1)),
          ],
        };
      }
      return {
        law: 'transfer-function',
        input,
        output,
        numerator: [gain / zero, gain].map(rounded).map(constant),
        denominator: [random.chance(0.5) ? draft.quantity('Tf', 1 / pole) : constant(rounded(1 / pole)), ONE],
      };
    }
    case 'state-space': {
      const gain = sign * stiffness * random.decade(-1.5, 0.3);
      const n = random.integer(1, 2);
      const rate = frequency * random.decade(-0.3, 1);
      const a = Array.from({ length: n }, (_, i) =>
        Array.from({ length: n }, (_, j) =>
          constant(rounded(i === j ? -rate * random.between(0.5, 2) : rate * random.between(-0.7, 0.7))),
        ),
      );
      return {
        law: 'state-space',
        input,
        output,
        a,
        b: a.map(() => constant(rounded(rate * random.between(-1, 1)))),
        c: a.map(() => constant(rounded(gain * random.between(-1, 1)))),
        d: constant(rounded(gain)),
      };
    }
  }
}

/** Gains that give the machine alone the wanted poles (Ackermann 1972), for its own states; undefined if unreachable. */
function placedGains(model: StudyModel, random: SeededRandom, frequency: number): number[] | undefined {
  const bare: StudyModel = {
    ...model,
    laws: [{ law: 'state-feedback', input: 'u', gains: [] }],
    actuators: [],
    sensor: undefined,
    sampling: undefined,
  };
  const loop = directLoop(bare, siValues(bare, nominalValues(bare)));
  const open = loop && closedMatrix(loop, 0);
  if (loop === undefined || open === undefined) return undefined;
  const n = loop.states;
  const multiply = (vector: Float64Array): Float64Array =>
    Float64Array.from(open.matrix, (row) => row.reduce((sum, entry, j) => sum + entry * vector[j], 0));
  const columns: Float64Array[] = [Float64Array.from(loop.b, (row) => row[0])];
  while (columns.length < n) columns.push(multiply(columns[columns.length - 1]));
  // qᵀ = the last row of the inverse of [b, Ab, …]: solve the transpose against the last unit vector.
  const transposed = columns.map((column) => column.slice());
  const last = transposed.map((_, i) => Float64Array.of(i === n - 1 ? 1 : 0));
  if (!solveInPlace(transposed, last)) return undefined;
  let row = Float64Array.from(last, ([value]) => value);
  const left = (vector: Float64Array): Float64Array =>
    Float64Array.from(vector, (_, j) => vector.reduce((sum, entry, i) => sum + entry * open.matrix[i][j], 0));
  for (let remaining = n; remaining > 0;) {
    const size = frequency * random.decade(-0.3, 0.5);
    const next = left(row);
    if (remaining === 1) {
      row = next.map((value, i) => value + size * row[i]);
      remaining--;
    } else {
      const damping = random.between(0.4, 1);
      const twice = left(next);
      const before = row;
      row = twice.map((value, i) => value + 2 * damping * size * next[i] + size * size * before[i]);
      remaining -= 2;
    }
  }
  return row.every((value) => Number.isFinite(value)) ? [...row] : undefined;
}

/** Lags, delays and sampling, some of them quantities that may get a band. */
export function addHardware(draft: StudyDraft, model: StudyModel, frequency: number, room: number): void {
  const { random } = draft;
  const time = (id: string): Term => {
    const value = random.decade(-2.5, -0.7) / frequency;
    return random.chance(0.6) ? draft.quantity(id, value) : constant(rounded(value));
  };
  let left = room;
  const path = (id: string): HardwareModel | undefined => {
    const lag = left >= 1 && random.chance(0.6) ? time(`${id}Lag`) : undefined;
    if (lag) left--;
    const order = Math.min(left, random.integer(1, 3));
    const delay = order > 0 && random.chance(0.35) ? time(`${id}Delay`) : undefined;
    if (delay) left -= order;
    if (lag === undefined && delay === undefined) return undefined;
    return { ...(lag && { lag }), ...(delay && { delay, padeOrder: order }) };
  };
  if (random.chance(0.65)) model.actuators = [path('actuator')];
  const sensors = model.laws[0].law === 'state-feedback' ? 2 : 1;
  if (sensors === 1 && left > 0 && random.chance(0.3)) model.sensor = path('sensor');
  if (left > 0 && random.chance(0.2))
    model.sampling = { period: time('period'), padeOrder: Math.min(left, 2) };
}
