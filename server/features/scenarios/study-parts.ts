import { canonicalJson, type Study } from '../../../shared/contracts';

/**
 * Canonical text of what the variant gives to a study: the machine, control and hardware, and the parameters with
 * nominals and physical ends. Equal texts are the same variant revision.
 */
export function variantDescription(study: Study): string {
  const { machine, definitions, parameters, control, actuator, sensor, sampling } = study;
  return canonicalJson({
    ...{ machine, definitions, control, actuator, sensor, sampling },
    parameters: parameters.map(({ id, label, unit, nominal, minimum, maximum }) => ({
      ...{ id, label, unit, nominal, minimum, maximum },
    })),
  });
}

/**
 * Canonical text of what the scenario adds: the bands and their kinds, which parameter is the payload, how far to
 * search, rating, requirements and map.
 */
export function toleranceSet(study: Study): string {
  const { name, parameters, payload, searchUpTo, searchDownTo, rating, requirements, map } = study;
  return canonicalJson({
    ...{ name, payload, searchUpTo, searchDownTo, rating, requirements, map },
    bands: parameters
      .filter(({ low, high, kind }) => low !== undefined || high !== undefined || kind !== undefined)
      .map(({ id, low, high, kind }) => ({ id, low, high, kind })),
  });
}
