import { type NodeId, parseExpression, ProgramBuilder } from '../../../expressions';
import type { ComposedHardware, ComposedLaw, ComposedLoop } from '../composed';

/** A machine with its entries written as expressions in p0, p1, …. */
export interface WrittenMachine {
  readonly order: 1 | 2;
  /** [K, D, M] or [−A, E]. */
  readonly coefficients: readonly (readonly (readonly string[])[])[];
  readonly inputs: Readonly<Record<string, readonly string[]>>;
  readonly outputs: Readonly<
    Record<string, { readonly position: readonly string[]; readonly velocity?: readonly string[] }>
  >;
}

export interface WrittenHardware {
  readonly lag?: string;
  readonly delay?: string;
  readonly padeOrder?: number;
}

/** Turns an expression into a node of the loop's program. */
export type Write = (text: string) => NodeId;

/** A loop from expressions; hardware that is left out is none. */
export function writtenLoop(
  machine: WrittenMachine,
  laws: (write: Write) => readonly ComposedLaw[],
  hardware: {
    readonly actuator?: WrittenHardware;
    readonly sensor?: WrittenHardware;
    readonly sampling?: WrittenHardware;
  } = {},
): ComposedLoop {
  const program = new ProgramBuilder();
  const write: Write = (text) =>
    program.expression(parseExpression(text), (name) => program.parameter(Number(name.slice(1))));
  const row = (texts: readonly string[]): NodeId[] => texts.map(write);
  const part = ({ lag = '0', delay = '0', padeOrder = 2 }: WrittenHardware = {}): ComposedHardware => ({
    lag: write(lag),
    delay: write(delay),
    padeOrder,
  });
  const list = laws(write);
  return {
    program,
    machine: {
      order: machine.order,
      names: machine.coefficients[0].map((_, i) => `x${i}`),
      coefficients: machine.coefficients.map((matrix) => matrix.map(row)),
      inputs: new Map(Object.entries(machine.inputs).map(([name, texts]) => [name, row(texts)])),
      disturbances: new Map(),
      outputs: new Map(
        Object.entries(machine.outputs).map(([name, { position, velocity = [] }]) => [
          name,
          { position: row(position), velocity: row(velocity) },
        ]),
      ),
    },
    laws: list,
    actuators: list.map(() => part(hardware.actuator)),
    sensor: part(hardware.sensor),
    sampling: part(hardware.sampling),
  };
}

/** Mass p0 with damping p1 and stiffness p2, pushed by u, its position measured as y. */
export const MASS: WrittenMachine = {
  order: 2,
  coefficients: [[['p2']], [['p1']], [['p0']]],
  inputs: { u: ['1'] },
  outputs: { y: { position: ['1'] }, v: { position: ['0'], velocity: ['1'] } },
};
