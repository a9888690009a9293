const DAY_MS = 24 * 3600 * 1000;

/** A session ends this long after the sign-in, however busy it is. */
export const LONGEST_SESSION_MS = 14 * DAY_MS;
/** It ends earlier when it stays unused for so long: over a weekend, not over a holiday. */
export const LONGEST_IDLE_MS = 3 * DAY_MS;
/** Being seen is written down no more often than this. */
export const SEEN_STEP_MS = 60_000;

export function later(moment: Date, milliseconds: number): Date {
  return new Date(moment.getTime() + milliseconds);
}

/** When a session ends unless it is used again. */
export function endOf({ expiresAt, lastSeenAt }: { expiresAt: Date; lastSeenAt: Date }): Date {
  const idle = later(lastSeenAt, LONGEST_IDLE_MS);
  return idle < expiresAt ? idle : expiresAt;
}
