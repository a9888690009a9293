import {
  actuatorsOf,
  hardwareFault,
  type HardwareQuantity,
  type PathPart,
  type Study,
} from '../../contracts';
import { lawPath } from '../../contracts/declared-names';
import type { NodeId } from '../../expressions';
import type { ComposedHardware, ComposedLaw } from '../loop/composed';
import { studyLaws } from './control';
import type { ExpressionCompiler } from './expression-compiler';
import type { FaultList } from './fault-list';
import type { NominalValues } from '../loop/nominal-values';

/** Order of the Padé form where the study does not say. */
const DEFAULT_PADE_ORDER = 2;

/** Delay of a digital controller in periods: one for computing, half of one for the hold. */
const SAMPLING_DELAY = 1.5;

/** A time that must not be negative, and must stay above 0 where it varies. */
export interface HardwareTime {
  readonly path: readonly PathPart[];
  readonly quantity: HardwareQuantity;
  readonly node: NodeId;
}

export interface StudyHardware {
  readonly actuators: readonly ComposedHardware[];
  readonly sensor: ComposedHardware;
  readonly sampling: ComposedHardware;
  readonly times: readonly HardwareTime[];
}

export function composeHardware(
  study: Study,
  laws: readonly ComposedLaw[],
  compiler: ExpressionCompiler,
): StudyHardware {
  const { program } = compiler;
  const times: HardwareTime[] = [];
  const path = (
    given: {
      lag?: string | number | undefined;
      delay?: string | number | undefined;
      padeOrder?: number | undefined;
    },
    at: readonly PathPart[],
  ): ComposedHardware => {
    const lag = compiler.scalar(given.lag, [...at, 'lag']);
    const delay = compiler.scalar(given.delay, [...at, 'delay']);
    times.push({ path: [...at, 'lag'], quantity: 'lag', node: lag });
    times.push({ path: [...at, 'delay'], quantity: 'delay', node: delay });
    return { lag, delay, padeOrder: given.padeOrder ?? DEFAULT_PADE_ORDER };
  };

  const actuators = actuatorsOf(study.actuator, studyLaws(study).length).map((actuator, index) =>
    path(actuator ?? {}, Array.isArray(study.actuator) ? ['actuator', index] : ['actuator']),
  );
  const sensor = path(study.sensor ?? {}, ['sensor']);
  let sampling = path({}, ['sampling']);
  if (study.sampling !== undefined) {
    const period = compiler.scalar(study.sampling.period, ['sampling', 'period']);
    times.push({ path: ['sampling', 'period'], quantity: 'period', node: period });
    sampling = {
      lag: program.zero,
      delay: program.multiply(program.constant(SAMPLING_DELAY), period),
      padeOrder: study.sampling.padeOrder ?? DEFAULT_PADE_ORDER,
    };
  }
  laws.forEach((law, index) => {
    if (law.law !== 'pid') return;
    times.push({
      path: [...lawPath(study, index), 'derivativeTime'],
      quantity: 'derivativeTime',
      node: law.derivativeTime,
    });
  });
  return { actuators, sensor, sampling, times };
}

/** Faults of times that are the same everywhere; those that vary are judged over the bands. */
export function checkTimes(times: readonly HardwareTime[], nominal: NominalValues, faults: FaultList): void {
  for (const { path, quantity, node } of times) {
    const value = nominal.constant(node);
    // What is not finite has its fault as an expression.
    const fault = value === undefined || !Number.isFinite(value) ? undefined : hardwareFault(quantity, value);
    // An expression that cannot be read stands as 0 here.
    if (fault !== undefined && !faults.has(path)) faults.add(path, fault);
  }
}
