import {
  EMPTY,
  catchError,
  debounceTime,
  defer,
  distinctUntilChanged,
  map,
  merge,
  switchMap,
  throttleTime,
  asyncScheduler,
  type Observable,
} from 'rxjs';
import type { MapAnswer } from '../../../../../shared/contracts';
import type { EngineClient } from '../../../engine';
import type { WantedMap } from './map-request';

/** A map as far as it is computed. */
export interface DrawnMap {
  readonly key: string;
  readonly map: MapAnswer;
  /** Milliseconds that the finest grid so far took. */
  readonly took: number;
  readonly finest: boolean;
}

/** While something is dragged a coarse map is enough, and this often. */
const DRAGGED_MILLISECONDS = 120;
const COARSE = 25;
/** After this rest the map is refined. */
const REST_MILLISECONDS = 200;

/** Maps of what is wanted: a coarse one as often as a hand can follow, the fine one when it rests. */
export function followMap(client: EngineClient, wanted: Observable<WantedMap>): Observable<DrawnMap> {
  const changed = wanted.pipe(distinctUntilChanged((a, b) => a.key === b.key));
  const coarse = changed.pipe(
    throttleTime(DRAGGED_MILLISECONDS, asyncScheduler, { leading: true, trailing: true }),
    map((request) => ({
      ...request,
      columns: Math.min(COARSE, request.columns),
      rows: Math.min(COARSE, request.rows),
      finest: false,
    })),
  );
  const fine = changed.pipe(
    debounceTime(REST_MILLISECONDS),
    map((request) => ({ ...request, finest: true })),
  );
  return merge(coarse, fine).pipe(switchMap((request) => drawn(client, request)));
}

function drawn(client: EngineClient, request: WantedMap & { finest: boolean }): Observable<DrawnMap> {
  const { study, columns, rows, key, finest } = request;
  return defer(() => {
    const began = performance.now();
    return client.map(study, { columns, rows }).pipe(
      map((answer) => ({
        key,
        map: answer,
        took: performance.now() - began,
        finest: finest && answer.x.length === columns,
      })),
      // What is wrong with the study is told by its answer; the old map stays.
      catchError(() => EMPTY),
    );
  });
}
