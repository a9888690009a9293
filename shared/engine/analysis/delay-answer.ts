import type { DelayAnswer } from '../../contracts';
import { atan2, evaluateProgram } from '../../expressions';
import type { LoopMatrix } from '../loop/loop-matrix';
import { padeCoefficients } from '../loop/pade';

/**
 * What the Padé forms in the loop fall short of the true delays in phase, at one point and frequency (rad/s):
 * Σ ωT − 2 arg Q(jωT) over the delays that the loop of one law passes. Undefined where the loop has no delay.
 */
export function delayAnswer(
  loop: LoopMatrix,
  law: number,
  parameters: ArrayLike<number>,
  frequency: number | null,
): DelayAnswer | undefined {
  if (loop.delays.length === 0) return undefined;
  if (frequency === null) return { approximated: true, phaseShortfall: null };
  const values = new Float64Array(loop.program.operations.length);
  evaluateProgram(loop.program, parameters, values);
  let shortfall = 0;
  // A loop passes one sensor, however many signals are measured.
  const passed = loop.delays.filter((delay, index) => {
    if (delay.law >= 0) return delay.law === law;
    return loop.delays.findIndex((other) => other.law < 0) === index;
  });
  for (const { node, padeOrder } of passed) shortfall += phaseShortfall(frequency * values[node], padeOrder);
  return { approximated: true, phaseShortfall: shortfall };
}

/** x − 2 arg Q(jx), arg Q followed continuously from 0: it rises to n π/2. */
export function phaseShortfall(x: number, order: number): number {
  const coefficients = padeCoefficients(order);
  const argument = (at: number): number => {
    let re = 0;
    let im = 0;
    let power = 1;
    coefficients.forEach((coefficient, k) => {
      const term = coefficient * power;
      if (k % 4 === 0) re += term;
      else if (k % 4 === 1) im += term;
      else if (k % 4 === 2) re -= term;
      else im -= term;
      power *= at;
    });
    return atan2(im, re);
  };
  // The argument turns by less than π per unit of x: unit steps never lose a whole turn.
  let total = 0;
  let before = 0;
  const steps = Math.min(1000, Math.ceil(Math.abs(x)) + 1);
  for (let i = 1; i <= steps; i++) {
    const here = argument((x * i) / steps);
    let turn = here - before;
    if (turn < -Math.PI) turn += 2 * Math.PI;
    total += turn;
    before = here;
  }
  return x - 2 * total;
}
