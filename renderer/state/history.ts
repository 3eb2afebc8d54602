/** A line of values with a present: what undo and redo walk along. Values are never changed in place. */
export interface History<T> {
  readonly past: readonly T[];
  readonly present: T;
  readonly future: readonly T[];
  /** Gesture the present came from while it lasts; changes of the same gesture replace the present. */
  readonly gesture: string | null;
}

const longestPast = 200;

export function startHistory<T>(present: T): History<T> {
  return { past: [], present, future: [], gesture: null };
}

/**
 * Adds a value. With a gesture name that equals the running one the present is replaced, so that a whole drag is one
 * entry; without one, or with another, a new entry begins. What was undone before is dropped.
 */
export function commit<T>(history: History<T>, next: T, gesture: string | null = null): History<T> {
  if (Object.is(next, history.present)) return history;
  if (gesture !== null && gesture === history.gesture) return { ...history, present: next, future: [] };
  const past = [...history.past, history.present].slice(-longestPast);
  return { past, present: next, future: [], gesture };
}

/** Ends the running gesture: the next change is an entry of its own. */
export function endGesture<T>(history: History<T>): History<T> {
  return history.gesture === null ? history : { ...history, gesture: null };
}

export function undo<T>(history: History<T>): History<T> {
  const previous = history.past.at(-1);
  if (previous === undefined) return history;
  const future = [history.present, ...history.future];
  return { past: history.past.slice(0, -1), present: previous, future, gesture: null };
}

export function redo<T>(history: History<T>): History<T> {
  const [next, ...future] = history.future;
  if (next === undefined) return history;
  return { past: [...history.past, history.present], present: next, future, gesture: null };
}
