export interface ThrottleOptions {
  /** In milliseconds, of the caller's. */
  readonly clock: () => number;
  readonly everyMs: number;
}

/** Whether something that comes often is to be passed on: the first time, and then no more often than stated. */
export function createThrottle({ clock, everyMs }: ThrottleOptions): () => boolean {
  let last = -Infinity;
  return () => {
    const now = clock();
    if (now - last < everyMs) return false;
    last = now;
    return true;
  };
}
