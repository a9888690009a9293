export function median(values: readonly number[]): number {
  const sorted = [...values].sort((a, b) => a - b);
  return sorted[sorted.length >> 1];
}

/** Milliseconds of one call. */
export function timed(call: () => void): number {
  const start = performance.now();
  call();
  return performance.now() - start;
}

/** Runs a course that yields to its end; its result. */
export function finish<T>(course: Generator<void, T>): T {
  for (;;) {
    const { done, value } = course.next();
    if (done === true) return value;
  }
}
