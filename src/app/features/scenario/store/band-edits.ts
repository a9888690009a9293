import type { Parameter, Study } from '../../../../../shared/contracts';
import { constantNumber } from './constant-number';

export type BandEnd = 'low' | 'high';

/**
 * The study with one end of a band elsewhere. An end does not pass the nominal value, nor the physical ends; the
 * search for the largest payload reaches at least to the payload band's end.
 */
export function withBandEnd(study: Study, id: string, end: BandEnd, value: number): Study {
  const parameters = study.parameters.map((parameter) =>
    parameter.id === id ? { ...parameter, [end]: withinEnds(parameter, end, value) } : parameter,
  );
  const payload = parameters.find((parameter) => parameter.id === study.payload);
  const high = constantNumber(payload?.high);
  const searched = constantNumber(study.searchUpTo);
  const tooFar = id === study.payload && high !== undefined && searched !== undefined && searched < high;
  return tooFar ? { ...study, parameters, searchUpTo: high } : { ...study, parameters };
}

function withinEnds(parameter: Parameter, end: BandEnd, value: number): number {
  const nominal = constantNumber(parameter.nominal);
  if (end === 'low') {
    const least = constantNumber(parameter.minimum) ?? -Infinity;
    return Math.max(least, Math.min(value, nominal ?? Infinity));
  }
  const most = constantNumber(parameter.maximum) ?? Infinity;
  return Math.min(most, Math.max(value, nominal ?? -Infinity));
}
