import type { NodeId, ProgramBuilder } from '../../expressions';
import type { ComposedHardware, ComposedLaw, ComposedLoop, ComposedOutput } from './composed';
import type { LoopDelay, LoopEntry, LoopMatrix, Signal } from './loop-matrix';
import { padeCoefficients } from './pade';

/**
 * Tells the value of a node that is the same everywhere in the analysis, undefined for one that varies.
 * A gain, lag or delay that is constantly 0 adds no row and no state.
 */
export type ConstantValue = (node: NodeId) => number | undefined;

/** Assembles machine, control and hardware into the polynomial matrix of the closed loop. */
export function buildLoop(composed: ComposedLoop, constantValue: ConstantValue): LoopMatrix {
  return new LoopAssembly(composed, constantValue).build();
}

class LoopAssembly {
  private readonly program: ProgramBuilder;
  private readonly entries: LoopEntry[] = [];
  private readonly delays: LoopDelay[] = [];
  private readonly measured = new Map<string, Signal>();
  private rows = 0;
  private columns = 0;

  constructor(
    private readonly composed: ComposedLoop,
    private readonly constantValue: ConstantValue,
  ) {
    this.program = composed.program;
  }

  build(): LoopMatrix {
    const { machine, laws } = this.composed;
    this.columns = machine.names.length;
    const forces = laws.map((law, index) => this.lawForce(law, index));
    machine.names.forEach((_, i) => {
      const row: Signal[] = [];
      machine.coefficients.forEach((matrix, power) => {
        row.push(matrix[i].map((node, column) => ({ column, power, node })));
      });
      laws.forEach((law, index) => {
        const share = machine.inputs.get(law.input)?.[i] ?? this.program.zero;
        row.push(this.scale(forces[index], this.program.negate(share)));
      });
      this.addRow(row);
    });
    const columnDegrees = new Array<number>(this.columns).fill(0);
    for (const { column, power } of this.entries)
      columnDegrees[column] = Math.max(columnDegrees[column], power);
    return {
      program: this.program,
      size: this.columns,
      entries: this.entries,
      columnDegrees,
      order: columnDegrees.reduce((sum, degree) => sum + degree, 0),
      lawInputs: laws.map((law) => law.input),
      delays: this.delays,
    };
  }

  /** The force of one law on the machine, behind its hardware. */
  private lawForce(law: ComposedLaw, index: number): Signal {
    const command = this.column();
    const output = this.lawOutput(law).map((signal) => this.negated(signal));
    this.addRow([[this.term(command)]], output, index);
    const sampled = this.behind([this.term(command)], this.composed.sampling, index);
    return this.behind(sampled, this.composed.actuators[index], index);
  }

  /** The summands of a law's output; e = −y, since the reference is 0. */
  private lawOutput(law: ComposedLaw): Signal[] {
    const { zero, one } = this.program;
    switch (law.law) {
      case 'pid': {
        const error = this.negated(this.measuredOutput(law.output));
        const parts: Signal[] = [this.scale(error, law.kp)];
        if (!this.isZero(law.ki)) parts.push(this.scale([this.filter([zero, one], error)], law.ki));
        if (!this.isZero(law.kd)) {
          const derived = this.isZero(law.derivativeTime)
            ? error
            : [this.filter([one, law.derivativeTime], error)];
          parts.push(this.scale(this.differentiated(derived), law.kd));
        }
        return parts;
      }
      case 'transfer-function': {
        if (law.numerator.every((node) => this.isZero(node))) return [];
        const error = this.negated(this.measuredOutput(law.output));
        const inner = this.filter(law.denominator, error);
        return law.numerator.map((node, power) => this.scale([{ ...inner, power }], node));
      }
      case 'state-space': {
        const error = this.negated(this.measuredOutput(law.output));
        const states = law.a.map(() => this.column());
        law.a.forEach((row, i) => {
          const coupling = row.map((node, j) => ({
            ...this.term(states[j]),
            node: this.program.negate(node),
          }));
          const drive = this.scale(error, this.program.negate(law.b[i]));
          this.addRow([[{ ...this.term(states[i]), power: 1 }], coupling, drive]);
        });
        return [law.c.map((node, j) => ({ ...this.term(states[j]), node })), this.scale(error, law.d)];
      }
      case 'state-feedback': {
        const parts = law.gains
          .filter(({ gain }) => !this.isZero(gain))
          .map(({ unknown, dots, gain }) => {
            const state: Signal = [{ column: unknown, power: dots, node: one }];
            return this.scale(
              this.throughSensor(`state ${unknown} ${dots}`, state),
              this.program.negate(gain),
            );
          });
        if (law.integral !== undefined && !this.isZero(law.integral.gain)) {
          const integral = this.filter([zero, one], this.measuredOutput(law.integral.output));
          parts.push(this.scale([integral], this.program.negate(law.integral.gain)));
        }
        return parts;
      }
    }
  }

  private measuredOutput(name: string): Signal {
    const output = this.composed.machine.outputs.get(name);
    return this.throughSensor(`output ${name}`, output === undefined ? [] : outputSignal(output));
  }

  /** Every measured signal has a sensor of its own; two laws that read the same signal share it. */
  private throughSensor(key: string, signal: Signal): Signal {
    let result = this.measured.get(key);
    if (result === undefined) {
      result = this.behind(signal, this.composed.sensor, -1);
      this.measured.set(key, result);
    }
    return result;
  }

  /** The signal behind a lag and a delay in series. */
  private behind(signal: Signal, hardware: ComposedHardware, law: number): Signal {
    let result = signal;
    if (!this.isZero(hardware.lag)) result = [this.filter([this.program.one, hardware.lag], result)];
    if (!this.isZero(hardware.delay)) {
      this.delays.push({ node: hardware.delay, padeOrder: hardware.padeOrder, law });
      result = this.delayed(result, this.padeNodes(hardware));
    }
    return result;
  }

  /**
   * Q(−s)/Q(s) · signal, with Q's coefficients given, as ±signal + (Q(−s) ∓ Q(s)) ξ, Q(s) ξ = signal: ξ is read below
   * its highest derivative only, so that the output of a delay can be differentiated once without a further state.
   */
  private delayed(signal: Signal, coefficients: readonly NodeId[]): Signal {
    const inner = this.filter(coefficients, signal);
    const parity = (coefficients.length - 1) % 2;
    const rest = coefficients.map((node, power) => ({
      ...inner,
      power,
      node: this.program.multiply(this.program.constant(power % 2 === 1 ? -2 : 2), node),
    }));
    return [
      ...(parity === 1 ? this.negated(signal) : signal),
      ...rest.filter(({ power }) => power % 2 !== parity),
    ];
  }

  private padeNodes(hardware: ComposedHardware): NodeId[] {
    let power = this.program.one;
    return padeCoefficients(hardware.padeOrder).map((coefficient, k) => {
      if (k > 0) power = this.program.multiply(power, hardware.delay);
      return this.program.multiply(this.program.constant(coefficient), power);
    });
  }

  /**
   * A new column ξ with denominator(s) ξ = input (controllable canonical form): what follows reads ξ and its
   * derivatives, so that the highest derivative stands in this row alone.
   */
  private filter(
    denominator: readonly NodeId[],
    input: Signal,
  ): { column: number; power: number; node: NodeId } {
    const column = this.column();
    const own = denominator.map((node, power) => ({ column, power, node }));
    this.addRow([own, this.negated(input)]);
    return this.term(column);
  }

  private column(): number {
    return this.columns++;
  }

  private term(column: number): { column: number; power: number; node: NodeId } {
    return { column, power: 0, node: this.program.one };
  }

  private scale(signal: Signal, factor: NodeId): Signal {
    return signal.map((term) => ({ ...term, node: this.program.multiply(factor, term.node) }));
  }

  private negated(signal: Signal): Signal {
    return signal.map((term) => ({ ...term, node: this.program.negate(term.node) }));
  }

  private differentiated(signal: Signal): Signal {
    return signal.map((term) => ({ ...term, power: term.power + 1 }));
  }

  /** A row Σ signals + Σ broken = 0, where `broken` is what vanishes when the loop of that law is broken. */
  private addRow(signals: readonly Signal[], broken: readonly Signal[] = [], law = -1): void {
    const row = this.rows++;
    this.addEntries(row, signals, -1);
    this.addEntries(row, broken, law);
  }

  private addEntries(row: number, signals: readonly Signal[], law: number): void {
    for (const { column, power, node } of signals.flat()) {
      if (!this.isZero(node)) this.entries.push({ row, column, power, node, law });
    }
  }

  private isZero(node: NodeId): boolean {
    return this.constantValue(node) === 0;
  }
}

function outputSignal(output: ComposedOutput): Signal {
  return [output.position, output.velocity].flatMap((nodes, power) =>
    nodes.map((node, column) => ({ column, power, node })),
  );
}
