import type { Observable } from 'rxjs';
import type { MapAnswer } from '../../../shared/contracts';
import type { LiveAnswer, LiveGrid } from './live-answer';

export type { LiveAnswer, LiveGrid } from './live-answer';

/** The engine did not answer: it broke, or its worker did. The next request starts anew. */
export class EngineBrokenError extends Error {
  override readonly name = 'EngineBrokenError';
}

/**
 * The engine in the browser. Nothing is computed before somebody subscribes; unsubscribing ends the computation
 * within a few milliseconds. A newer subscription takes the place of the older one of its kind, which completes
 * without having been complete. Both fail with EngineBrokenError.
 */
export abstract class EngineClient {
  /** First the nominal answer, the largest payload and the verdict, then the rating, then all. Faults are an answer. */
  abstract live(study: unknown): Observable<LiveAnswer>;

  /**
   * The study's map, coarse at first, then as fine as asked for.
   *
   * @returns fails with StudyFaultError where the study has faults or no map
   */
  abstract map(study: unknown, grid: LiveGrid): Observable<MapAnswer>;
}
