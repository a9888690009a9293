import type { SearchVariable } from '../contact/search-family';
import type { ComposedStudy } from '../study';

/** The dimensions of every search: parameters with a band, and the payload. */
export interface SearchSpace {
  /** Parameter index of each variable. */
  readonly parameters: readonly number[];
  readonly variables: readonly SearchVariable[];
  /** Index of the payload among the variables, −1 without one. */
  readonly payload: number;
  readonly nominal: Float64Array;
}

export function searchSpace(study: ComposedStudy): SearchSpace {
  const parameters = study.parameters
    .map((_, index) => index)
    .filter((index) => study.parameters[index].hasBand || index === study.payload);
  const variables = parameters.map((index) => {
    const { nominal, low, high, minimum, maximum, kind } = study.parameters[index];
    const stretches = kind !== 'use' || index === study.payload;
    return { nominal, low, high, minimum, maximum, stretches };
  });
  return {
    parameters,
    variables,
    payload: study.payload === undefined ? -1 : parameters.indexOf(study.payload),
    nominal: Float64Array.from(variables, ({ nominal }) => nominal),
  };
}
