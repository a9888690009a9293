import { solveInPlace } from './linear-solve';
import type { HardwareModel, LawModel, MachineModel, StudyModel } from './study-model';
import type { Term } from './term';

/** Room for the states of a loop. */
const MOST_STATES = 16;

/** A signal as a row: its dependence on the states, then on the commanded inputs. */
type Signal = Float64Array;

/**
 * ẋ = A x + B u, v = C x + D u: machine, hardware and laws in series, from the commanded inputs u to what the laws
 * command, v. Closing the loop of a law means u_j = v_j.
 */
export interface StateSpace {
  readonly states: number;
  readonly a: Float64Array[];
  readonly b: Float64Array[];
  readonly c: Float64Array[];
  readonly d: Float64Array[];
}

/** The matrices of a study's loop at a point (SI values), by putting state-space forms in series. */
export function directLoop(model: StudyModel, point: ArrayLike<number>): StateSpace | undefined {
  return new LoopAtPoint(model, point).build();
}

class LoopAtPoint {
  private readonly derivatives: Signal[] = [];
  private readonly sensed = new Map<string, Signal>();
  private readonly inputs: number;

  constructor(
    private readonly model: StudyModel,
    private readonly point: ArrayLike<number>,
  ) {
    this.inputs = model.laws.length;
  }

  build(): StateSpace | undefined {
    const { machine, laws } = this.model;
    const plant = machine.order * machine.names.length;
    for (let i = 0; i < plant; i++) this.newState();
    const forces = laws.map((law, j) => ({ law, signal: this.force(j) }));
    if (!this.machineDerivatives(machine, forces)) return undefined;
    const commands = laws.map((law) => this.lawOutput(law));
    const states = this.derivatives.length;
    const cut = (rows: Signal[], from: number, count: number): Float64Array[] =>
      rows.map((signal) => signal.slice(from, from + count));
    return {
      states,
      a: cut(this.derivatives, 0, states),
      b: cut(this.derivatives, MOST_STATES, this.inputs),
      c: cut(commands, 0, states),
      d: cut(commands, MOST_STATES, this.inputs),
    };
  }

  private zero(): Signal {
    return new Float64Array(MOST_STATES + this.inputs);
  }

  private unit(index: number): Signal {
    const signal = this.zero();
    signal[index] = 1;
    return signal;
  }

  private newState(): number {
    if (this.derivatives.length === MOST_STATES) throw new RangeError(`more than ${MOST_STATES} states`);
    this.derivatives.push(this.zero());
    return this.derivatives.length - 1;
  }

  private value(term: Term): number {
    return term.at(this.point);
  }

  private force(law: number): Signal {
    const { sampling, actuators } = this.model;
    let signal = this.unit(MOST_STATES + law);
    if (sampling) signal = this.delayed(signal, 1.5 * this.value(sampling.period), sampling.padeOrder ?? 2);
    return this.through(signal, actuators[law]);
  }

  private through(signal: Signal, hardware: HardwareModel | undefined): Signal {
    let result = signal;
    if (hardware?.lag) result = this.lagged(result, this.value(hardware.lag));
    if (hardware?.delay) result = this.delayed(result, this.value(hardware.delay), hardware.padeOrder ?? 2);
    return result;
  }

  private lagged(signal: Signal, time: number): Signal {
    const state = this.newState();
    this.derivatives[state] = linear([1 / time, signal], [-1 / time, this.unit(state)]);
    return this.unit(state);
  }

  /** Padé form of equal degrees n: Σ c_k (−sT)^k / Σ c_k (sT)^k, c_k = (2n−k)! n!/((2n)! k! (n−k)!). */
  private delayed(signal: Signal, time: number, order: number): Signal {
    const c = [1];
    for (let k = 0; k < order; k++) c.push((c[k] * (order - k)) / ((2 * order - k) * (k + 1)));
    const monic = c.map((coefficient) => coefficient / c[order]);
    const through = order % 2 === 0 ? 1 : -1;
    const first = this.newState();
    for (let k = 1; k < order; k++) this.newState();
    let output = linear([through, signal]);
    let last = linear([1 / time, signal]);
    for (let k = 0; k < order; k++) {
      const state = this.unit(first + k);
      if (k + 1 < order) this.derivatives[first + k] = linear([1 / time, this.unit(first + k + 1)]);
      last = linear([1, last], [-monic[k] / time, state]);
      output = linear([1, output], [((k % 2 === 0 ? 1 : -1) - through) * monic[k], state]);
    }
    this.derivatives[first + order - 1] = last;
    return output;
  }

  private machineDerivatives(machine: MachineModel, forces: { law: LawModel; signal: Signal }[]): boolean {
    const n = machine.names.length;
    const numbers = (rows: Term[][]): Float64Array[] =>
      rows.map((row) => Float64Array.from(row, (term) => this.value(term)));
    const right: Signal[] = machine.names.map((_, i) => {
      const row = this.zero();
      if (machine.order === 2) {
        for (let j = 0; j < n; j++) {
          row[j] = -this.value(machine.stiffness[i][j]);
          row[n + j] = -this.value(machine.damping[i][j]);
        }
      } else {
        for (let j = 0; j < n; j++) row[j] = this.value(machine.dynamics[i][j]);
      }
      const pushes = forces.map(({ law, signal }): [number, Signal] => [
        this.value(machine.inputs[law.input][i]),
        signal,
      ]);
      return linear([1, row], ...pushes);
    });
    const left = machine.order === 2 ? machine.mass : machine.descriptor;
    if (left !== undefined && !solveInPlace(numbers(left), right)) return false;
    const offset = machine.order === 2 ? n : 0;
    for (let i = 0; i < n; i++) {
      if (machine.order === 2) this.derivatives[i] = this.unit(n + i);
      this.derivatives[offset + i] = right[i];
    }
    return true;
  }

  private sensor(key: string, signal: () => Signal): Signal {
    let result = this.sensed.get(key);
    if (result === undefined) {
      result = this.through(signal(), this.model.sensor);
      this.sensed.set(key, result);
    }
    return result;
  }

  private output(name: string): Signal {
    return this.sensor(`output ${name}`, () => {
      const { machine } = this.model;
      const n = machine.names.length;
      const row = this.zero();
      if (machine.order === 1) {
        machine.outputs[name].forEach((term, j) => (row[j] = this.value(term)));
      } else {
        const { position, velocity } = machine.outputs[name];
        position?.forEach((term, j) => (row[j] = this.value(term)));
        velocity?.forEach((term, j) => (row[n + j] = this.value(term)));
      }
      return row;
    });
  }

  private state(name: string): Signal {
    const { names } = this.model.machine;
    const rate = this.model.machine.order === 2 && name.endsWith("'");
    const index = names.indexOf(rate ? name.slice(0, -1) : name);
    return this.sensor(`state ${name}`, () => this.unit(index + (rate ? names.length : 0)));
  }

  private integrated(signal: Signal): Signal {
    const state = this.newState();
    this.derivatives[state] = signal;
    return this.unit(state);
  }

  /** d/dt of a signal that no commanded input enters directly. */
  private differentiated(signal: Signal): Signal {
    const summands: [number, Signal][] = [];
    this.derivatives.forEach((derivative, i) => {
      if (signal[i] !== 0) summands.push([signal[i], derivative]);
    });
    return summands.length === 0 ? this.zero() : linear(...summands);
  }

  private lawOutput(law: LawModel): Signal {
    switch (law.law) {
      case 'pid': {
        const error = linear([-1, this.output(law.output)]);
        let result = linear([this.value(law.kp), error]);
        if (law.ki) result = linear([1, result], [this.value(law.ki), this.integrated(error)]);
        if (law.kd) {
          const gain = this.value(law.kd);
          if (law.derivativeTime) {
            const time = this.value(law.derivativeTime);
            const filtered = this.lagged(error, time);
            result = linear([1, result], [gain / time, error], [-gain / time, filtered]);
          } else {
            result = linear([1, result], [gain, this.differentiated(error)]);
          }
        }
        return result;
      }
      case 'state-feedback': {
        let result = this.zero();
        for (const { state, gain } of law.gains) {
          result = linear([1, result], [-this.value(gain), this.state(state)]);
        }
        if (law.integral) {
          const integral = this.integrated(this.output(law.integral.output));
          result = linear([1, result], [-this.value(law.integral.gain), integral]);
        }
        return result;
      }
      case 'transfer-function':
        return this.quotient(law.numerator, law.denominator, linear([-1, this.output(law.output)]));
      case 'state-space': {
        const error = linear([-1, this.output(law.output)]);
        const first = this.derivatives.length;
        law.a.forEach(() => this.newState());
        law.a.forEach((row, i) => {
          const terms = row.map((term, j): [number, Signal] => [this.value(term), this.unit(first + j)]);
          this.derivatives[first + i] = linear([this.value(law.b[i]), error], ...terms);
        });
        const outputs = law.c.map((term, j): [number, Signal] => [this.value(term), this.unit(first + j)]);
        return linear([this.value(law.d), error], ...outputs);
      }
    }
  }

  private quotient(numerator: Term[], denominator: Term[], signal: Signal): Signal {
    const degree = denominator.length - 1;
    const leading = this.value(denominator[0]);
    const den = denominator.map((term) => this.value(term) / leading).reverse();
    const num = numerator.map((term) => this.value(term) / leading).reverse();
    while (num.length <= degree) num.push(0);
    const first = this.derivatives.length;
    for (let k = 0; k < degree; k++) this.newState();
    let last = signal;
    let output = linear([num[degree], signal]);
    for (let k = 0; k < degree; k++) {
      const state = this.unit(first + k);
      if (k + 1 < degree) this.derivatives[first + k] = this.unit(first + k + 1);
      last = linear([1, last], [-den[k], state]);
      output = linear([1, output], [num[k] - num[degree] * den[k], state]);
    }
    if (degree > 0) this.derivatives[first + degree - 1] = last;
    return output;
  }
}

function linear(...summands: [number, Signal][]): Signal {
  const result = new Float64Array(summands[0][1].length);
  for (const [factor, signal] of summands) {
    if (factor === 0) continue;
    for (let i = 0; i < result.length; i++) result[i] += factor * signal[i];
  }
  return result;
}
