/** A value, and what was done to come to it. */
export interface Step<T> {
  readonly value: T;
  readonly what: string;
}

/** What was done and can be undone, what was undone and can be done again. Values are never changed in place. */
export interface History<T> {
  readonly past: readonly Step<T>[];
  readonly present: T;
  /** What led to the present; empty at the beginning. */
  readonly what: string;
  readonly future: readonly Step<T>[];
  /** The gesture that the present came from, while others of it may join. */
  readonly gesture: { readonly name: string; readonly open: boolean; readonly at: number } | undefined;
}

export interface Act {
  readonly what: string;
  /** Acts of one gesture are undone together: those of a drag, and the same small step done again at once. */
  readonly gesture?: string;
  /** More of this gesture is sure to come, however long it rests. */
  readonly open?: boolean;
  /** Milliseconds of any clock. */
  readonly at: number;
}

const MOST_STEPS = 200;
/** The same small step within this time joins the one before. */
const JOINED_MILLISECONDS = 1000;

export function beginHistory<T>(present: T): History<T> {
  return { past: [], present, what: '', future: [], gesture: undefined };
}

export function did<T>(history: History<T>, value: T, act: Act): History<T> {
  const { gesture: last } = history;
  const joins =
    last !== undefined &&
    last.name === act.gesture &&
    (last.open || act.at - last.at < JOINED_MILLISECONDS) &&
    history.past.length > 0;
  const before = { value: history.present, what: history.what };
  return {
    past: joins ? history.past : [...history.past, before].slice(-MOST_STEPS),
    present: value,
    what: act.what,
    future: [],
    gesture:
      act.gesture === undefined ? undefined : { name: act.gesture, open: act.open === true, at: act.at },
  };
}

export function undone<T>(history: History<T>): History<T> {
  const before = history.past.at(-1);
  if (before === undefined) return history;
  return {
    past: history.past.slice(0, -1),
    present: before.value,
    what: before.what,
    future: [{ value: history.present, what: history.what }, ...history.future],
    gesture: undefined,
  };
}

export function redone<T>(history: History<T>): History<T> {
  const [after, ...future] = history.future;
  if (after === undefined) return history;
  return {
    past: [...history.past, { value: history.present, what: history.what }],
    present: after.value,
    what: after.what,
    future,
    gesture: undefined,
  };
}
