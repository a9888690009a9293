import type { Scalar } from '../../../shared/contracts';

/**
 * A first-order machine whose characteristic polynomial is the given one, highest power first: the states are a
 * quantity and its derivatives, and the leading coefficient stands in the descriptor, so that nothing is divided.
 */
export function companionMachine(polynomial: readonly Scalar[]) {
  const [leading, ...rest] = polynomial;
  const order = rest.length;
  const unit = (column: number, entry: Scalar): Scalar[] =>
    Array.from({ length: order }, (_, j) => (j === column ? entry : 0));
  return {
    states: Array.from({ length: order }, (_, i) => `z${i}`),
    descriptor: rest.map((_, i) => unit(i, i === order - 1 ? leading : 1)),
    dynamics: rest.map((_, i) => (i === order - 1 ? [...rest].reverse().map(negated) : unit(i + 1, 1))),
  };
}

/**
 * The plant numerator(s)/denominator(s), highest power first and strictly proper, as a companion machine with the
 * input `u` and the output `y`.
 */
export function companionPlant(numerator: readonly Scalar[], denominator: readonly Scalar[]) {
  const machine = companionMachine(denominator);
  const order = machine.states.length;
  const output = [...numerator].reverse();
  return {
    ...machine,
    inputs: { u: machine.states.map((_, i) => (i === order - 1 ? 1 : 0)) },
    outputs: { y: machine.states.map((_, i) => output[i] ?? 0) },
  };
}

/** u = gain · (r − y): with it L is the plant times the gain. */
export function staticGain(gain: Scalar) {
  return { law: 'pid', input: 'u', output: 'y', kp: gain, ki: 0, kd: 0 };
}

function negated(entry: Scalar): Scalar {
  return typeof entry === 'number' ? 0 - entry : `-(${entry})`;
}
