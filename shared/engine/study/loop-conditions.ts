import { isSecondOrder, isTemplateMachine, type CustomMachine, type Study } from '../../contracts';
import { lawPath } from '../../contracts/declared-names';
import type { ComposedLaw, ComposedMachine } from '../loop/composed';
import type { SignCondition } from './domain/sign-condition';
import type { HardwareTime } from './hardware';
import type { NominalValues } from '../loop/nominal-values';

/** A lag or delay that varies stays above 0: at 0 the loop would lose a pole and with it its order. */
export function timeConditions(times: readonly HardwareTime[], nominal: NominalValues): SignCondition[] {
  return times
    .filter(({ node }) => nominal.isVarying(node))
    .map(({ path, node }) => ({
      path,
      subject: { kind: 'node', node },
      sign: 'positive',
      message: (point) => `must be above 0 throughout its band, but is not${point}; give a low end above 0`,
    }));
}

/** The leading coefficient of a law's denominator has no zero, for the same reason. */
export function leadingConditions(
  study: Study,
  laws: readonly ComposedLaw[],
  nominal: NominalValues,
): SignCondition[] {
  return laws.flatMap((law, index): SignCondition[] => {
    if (law.law !== 'transfer-function' || law.denominator.length === 0) return [];
    const node = law.denominator[law.denominator.length - 1];
    if (!nominal.isVarying(node)) return [];
    return [
      {
        path: [...lawPath(study, index), 'denominator'],
        subject: { kind: 'node', node },
        sign: 'nonzero',
        message: (point) => `the leading coefficient is 0${point}; it must not be 0 anywhere in the bands`,
      },
    ];
  });
}

/** The mass or descriptor matrix is regular; one that is left out is the identity. */
export function matrixConditions(
  study: Study,
  machine: CustomMachine,
  composed: ComposedMachine,
): SignCondition[] {
  const isMass = isSecondOrder(machine);
  if (!isMass && machine.descriptor === undefined) return [];
  const key = isMass ? 'mass' : 'descriptor';
  return [
    {
      path: isTemplateMachine(study.machine) ? ['machine'] : ['machine', key],
      subject: { kind: 'determinant', rows: composed.coefficients[composed.order] },
      sign: 'nonzero',
      message: (point) => `the ${key} matrix is singular${point}`,
    },
  ];
}
