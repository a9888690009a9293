import { cos, exp, log, pow, sin, tan } from './elementary';
import type { Program } from './program';

/**
 * Evaluates every node of a program in double precision.
 *
 * @param parameters values of all parameters in SI units, by parameter index
 * @param values receives one value per node; NaN or an infinity where the point lies outside an operation's domain
 */
export function evaluateProgram(program: Program, parameters: ArrayLike<number>, values: Float64Array): void {
  const { operations, left, right, constants } = program;
  for (let id = 0; id < operations.length; id++) {
    const a = left[id];
    const b = right[id];
    switch (operations[id]) {
      case 'constant':
        values[id] = constants[id];
        break;
      case 'parameter':
        values[id] = parameters[a];
        break;
      case 'add':
        values[id] = values[a] + values[b];
        break;
      case 'subtract':
        values[id] = values[a] - values[b];
        break;
      case 'multiply':
        values[id] = values[a] * values[b];
        break;
      case 'divide':
        values[id] = values[a] / values[b];
        break;
      case 'negate':
        values[id] = -values[a];
        break;
      case 'power':
        values[id] = pow(values[a], values[b]);
        break;
      case 'sqrt':
        values[id] = Math.sqrt(values[a]);
        break;
      case 'sin':
        values[id] = sin(values[a]);
        break;
      case 'cos':
        values[id] = cos(values[a]);
        break;
      case 'tan':
        values[id] = tan(values[a]);
        break;
      case 'exp':
        values[id] = exp(values[a]);
        break;
      case 'log':
        values[id] = log(values[a]);
        break;
      case 'abs':
        values[id] = Math.abs(values[a]);
        break;
    }
  }
}
