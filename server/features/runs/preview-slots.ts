import { previewSuperseded, previewTooLong, tooManyPreviews } from './runs.errors';
import { unavailable } from '../../platform/problem';

/** One person's previews at a time; a hand drags one, and may have several windows. */
const MOST_PREVIEWS = 4;
/** What takes longer is no preview; it would keep threads from the others. */
const LONGEST_MS = 30_000;

export interface PreviewClaim {
  readonly personId: string;
  /** Name of a stream of previews, of which only the newest counts. */
  readonly supersedes: string | undefined;
  /** Aborted when nobody waits for the answer any longer. */
  readonly signal: AbortSignal;
}

/** Who previews what at the moment. */
export interface PreviewSlots {
  /**
   * Computes with a signal that also ends what a newer preview takes the place of, or what takes too long.
   *
   * @throws Problem preview-superseded, preview-too-long, too-many-at-once, unavailable
   */
  hold<T>(claim: PreviewClaim, compute: (signal: AbortSignal) => Promise<T>): Promise<T>;
}

export function createPreviewSlots({ longestMs = LONGEST_MS }: { longestMs?: number } = {}): PreviewSlots {
  const streams = new Map<string, AbortController>();
  const counts = new Map<string, number>();

  const count = (personId: string, change: 1 | -1): void => {
    const next = (counts.get(personId) ?? 0) + change;
    if (next > 0) counts.set(personId, next);
    else counts.delete(personId);
  };

  return {
    hold: async ({ personId, supersedes, signal }, compute) => {
      const key = supersedes === undefined ? undefined : JSON.stringify([personId, supersedes]);
      const stop = new AbortController();
      if (key !== undefined) {
        streams.get(key)?.abort(previewSuperseded());
        streams.set(key, stop);
      }
      const isCounted = (counts.get(personId) ?? 0) < MOST_PREVIEWS;
      if (isCounted) count(personId, 1);
      const leave = () => stop.abort(unavailable('Nobody waits for the answer any longer.'));
      signal.addEventListener('abort', leave);
      const late = setTimeout(() => stop.abort(previewTooLong()), longestMs);
      try {
        if (!isCounted) throw tooManyPreviews(MOST_PREVIEWS);
        if (signal.aborted) leave();
        stop.signal.throwIfAborted();
        return await compute(stop.signal);
      } finally {
        clearTimeout(late);
        signal.removeEventListener('abort', leave);
        if (isCounted) count(personId, -1);
        if (key !== undefined && streams.get(key) === stop) streams.delete(key);
      }
    },
  };
}
