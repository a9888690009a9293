import { canonicalJson, type MapMeasure, type MapRequest, type Study } from '../../../../../shared/contracts';
import { constantNumber } from '../store/constant-number';
import type { Range } from './axis-range';
import type { MapChoice } from './map-choice';

/** A map to be computed. Two requests with the same key have the same map. */
export interface WantedMap {
  readonly study: Study;
  readonly columns: number;
  readonly rows: number;
  readonly key: string;
}

/** A cell with the others anywhere in their bands costs some hundred times one at nominal. */
const GRIDS = { nominal: { columns: 81, rows: 61 }, anywhere: { columns: 41, rows: 31 } } as const;

export function wantedMap(study: Study, choice: MapChoice, x: Range, y: Range): WantedMap {
  const map: MapRequest = { ...choice, xFrom: x.low, xTo: x.high, yFrom: y.low, yTo: y.high };
  const grid = GRIDS[choice.others];
  const key = canonicalJson({ ...relevantParts(study, choice), map });
  return { study: { ...study, map: { ...map, ...grid } }, ...grid, key };
}

/** Without what no cell depends on: with the others at nominal that is every band, so a dragged band keeps its map. */
function relevantParts(study: Study, { x, y, others }: MapChoice): object {
  const parameters = study.parameters.map((parameter) => {
    const { id, nominal, unit, low, high } = parameter;
    const hasBandInMap = others === 'anywhere' && id !== x && id !== y;
    return hasBandInMap ? { id, nominal, unit, low, high } : { id, nominal, unit };
  });
  return {
    ...study,
    ...{ name: undefined, rating: undefined, searchUpTo: undefined, searchDownTo: undefined },
    parameters,
  };
}

/** The value below which a map's cells fail; stability's limit where nothing is required of the measure. */
export function limitOf(measure: MapMeasure, { requirements }: Study): number {
  if (measure === 'closest') return 1;
  const required = requirements.find((requirement) => requirement.measure === measure);
  const level =
    required !== undefined && 'atLeast' in required ? constantNumber(required.atLeast) : undefined;
  return level ?? (measure === 'gainMargin' ? 1 : 0);
}

/** The study at one point of the map, everything else at nominal: for reading its measures. */
export function pointStudy(study: Study, values: Readonly<Record<string, number>>): Study {
  const parameters = study.parameters.map((parameter) => ({
    ...parameter,
    nominal: values[parameter.id] ?? parameter.nominal,
    ...{ low: undefined, high: undefined, minimum: undefined, maximum: undefined },
  }));
  return {
    ...study,
    parameters,
    ...{ payload: undefined, rating: undefined, map: undefined },
    ...{ searchUpTo: undefined, searchDownTo: undefined },
  };
}
