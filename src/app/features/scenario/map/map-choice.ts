import type { ParamMap } from '@angular/router';
import {
  MAP_DEFAULTS,
  MAP_MEASURES,
  MAP_OTHERS,
  type MapMeasure,
  type MapOthers,
  type Study,
} from '../../../../../shared/contracts';

/** What the map shows. */
export interface MapChoice {
  /** Ids of the parameters across and up. */
  readonly x: string;
  readonly y: string;
  readonly measure: MapMeasure;
  readonly others: MapOthers;
}

/** What the map shows where the address says nothing: as the study asks, else the payload against the first band. */
export function usualChoice(study: Study): MapChoice | undefined {
  const { map, parameters, payload } = study;
  const banded = parameters.filter(({ low }) => low !== undefined);
  const ids = [payload, ...banded.map(({ id }) => id), ...parameters.map(({ id }) => id)].filter(
    (id): id is string => parameters.some((parameter) => parameter.id === id),
  );
  const x = known(parameters, map?.x) ?? ids[0];
  const y = [known(parameters, map?.y), ...ids].find((id) => id !== undefined && id !== x);
  if (x === undefined || y === undefined) return undefined;
  return { x, y, measure: map?.measure ?? MAP_DEFAULTS.measure, others: map?.others ?? MAP_DEFAULTS.others };
}

/** What the address asks for, as far as the study has it. */
export function readMapChoice(query: ParamMap, study: Study): MapChoice | undefined {
  const usual = usualChoice(study);
  if (usual === undefined) return undefined;
  const x = known(study.parameters, query.get('x')) ?? usual.x;
  const y = known(study.parameters, query.get('y')) ?? usual.y;
  return {
    x,
    // The same across and up is a line: the other axis gives way.
    y: y === x ? (x === usual.y ? usual.x : usual.y) : y,
    measure: MAP_MEASURES.find((measure) => measure === query.get('measure')) ?? usual.measure,
    others: MAP_OTHERS.find((others) => others === query.get('others')) ?? usual.others,
  };
}

/** What the address has to say of a choice: only what differs from the usual one. */
export function writeMapChoice(choice: MapChoice, study: Study): Record<keyof MapChoice, string | null> {
  const usual = usualChoice(study);
  const told = (key: keyof MapChoice): string | null => (choice[key] === usual?.[key] ? null : choice[key]);
  return { x: told('x'), y: told('y'), measure: told('measure'), others: told('others') };
}

function known(parameters: Study['parameters'], id: string | null | undefined): string | undefined {
  return parameters.find((parameter) => parameter.id === id)?.id;
}
