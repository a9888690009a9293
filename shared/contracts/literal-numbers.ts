import { lawsOf } from './control';
import { lawPath } from './declared-names';
import type { Fault } from './fault';
import { hardwareFault, type HardwareQuantity } from './hardware';
import { bandFaults, searchFault, type ParameterNumbers } from './parameter-band';
import type { Parameter } from './parameter';
import { formatPath, type PathPart } from './path';
import { ratingFault } from './rating';
import { requirementLevelFault, type Requirement } from './requirement';
import type { Scalar } from './scalar';
import type { Study } from './study';

/**
 * Faults of values that are given as plain numbers. Expressions are judged by the same functions where they are
 * evaluated.
 */
export function checkLiteralNumbers(study: Study): Fault[] {
  const faults: Fault[] = [];
  const report = (path: readonly PathPart[], message: string | undefined) => {
    if (message !== undefined) faults.push({ path: formatPath(path), message });
  };
  const judge = (
    path: readonly PathPart[],
    value: Scalar | undefined,
    fault: (value: number) => string | undefined,
  ) => {
    const number = literal(value);
    if (number !== undefined) report(path, fault(number));
  };

  study.parameters.forEach((parameter, index) => {
    for (const { key, message } of bandFaults(literalBand(parameter)))
      report(['parameters', index, key], message);
  });
  const payload = study.parameters.find(({ id }) => id === study.payload);
  if (payload !== undefined) {
    const band = literalBand(payload);
    judge(['searchUpTo'], study.searchUpTo, (value) => searchFault('searchUpTo', value, band));
    judge(['searchDownTo'], study.searchDownTo, (value) => searchFault('searchDownTo', value, band));
  }

  const { rating, map } = study;
  judge(['rating', 'payload'], rating?.payload, (value) => ratingFault('payload', value));
  judge(['rating', 'step'], rating?.step, (value) => ratingFault('step', value));
  rating?.tests?.forEach(({ factor, requirements }, index) => {
    judge(['rating', 'tests', index, 'factor'], factor, (value) => ratingFault('factor', value));
    if (requirements !== undefined) checkLevels(requirements, ['rating', 'tests', index, 'requirements']);
  });

  const hardware = (path: readonly PathPart[], quantity: HardwareQuantity, value: Scalar | undefined) =>
    judge([...path, quantity], value, (number) => hardwareFault(quantity, number));
  lawsOf(study.control).forEach((law, index) => {
    if (law.law === 'pid') hardware(lawPath(study, index), 'derivativeTime', law.derivativeTime);
  });
  const actuators = Array.isArray(study.actuator) ? study.actuator : [study.actuator];
  actuators.forEach((actuator, index) => {
    const path = Array.isArray(study.actuator) ? ['actuator', index] : ['actuator'];
    hardware(path, 'lag', actuator?.lag);
    hardware(path, 'delay', actuator?.delay);
  });
  hardware(['sensor'], 'lag', study.sensor?.lag);
  hardware(['sensor'], 'delay', study.sensor?.delay);
  hardware(['sampling'], 'period', study.sampling?.period);

  checkLevels(study.requirements, ['requirements']);

  for (const [from, to] of [
    ['xFrom', 'xTo'],
    ['yFrom', 'yTo'],
  ] as const) {
    judge(['map', from], map?.[from], (start) => {
      const end = literal(map?.[to]);
      return end !== undefined && start >= end ? `must be below ${to} (${start} ≥ ${end})` : undefined;
    });
  }
  return faults;

  function checkLevels(requirements: readonly Requirement[], path: readonly PathPart[]): void {
    requirements.forEach((requirement, index) => {
      if (requirement.measure === 'stability') return;
      const { measure, atLeast } = requirement;
      judge([...path, index, 'atLeast'], atLeast, (value) => requirementLevelFault(measure, value));
    });
  }
}

function literal(value: Scalar | undefined): number | undefined {
  return typeof value === 'number' ? value : undefined;
}

function literalBand({ nominal, low, high, minimum, maximum }: Parameter): ParameterNumbers {
  return {
    nominal: literal(nominal),
    low: literal(low),
    high: literal(high),
    minimum: literal(minimum),
    maximum: literal(maximum),
  };
}
