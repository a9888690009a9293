import type { Study } from '../../../shared/contracts';
import { liftTableStudy } from './lift-table-study';

/** With margins to be drawn, which take longest, over every corner of the other bands: minutes of work. */
export function endlessStudy(): Study {
  return {
    ...liftTableStudy(),
    map: { x: 'm', y: 'k', columns: 501, rows: 501, measure: 'modulusMargin', others: 'anywhere' },
  };
}

/** A map of modulus margins that keeps a thread busy for seconds. */
export function mapStudy(columns: number, rows = columns): Study {
  return { ...liftTableStudy(), map: { x: 'm', y: 'k', columns, rows, measure: 'modulusMargin' } };
}
