import type { AbortSignalLike } from "./job";

export interface CancelSource {
  readonly signal: AbortSignalLike;
  /** Marks the signal and calls each listener once; a listener that throws does not keep the others from being called. */
  cancel(): void;
}

/** An AbortController for code that knows no DOM. A listener added after the cancel is never called, as in a browser. */
export function cancelSource(): CancelSource {
  let aborted = false;
  const listeners = new Set<() => void>();
  return {
    signal: {
      get aborted() {
        return aborted;
      },
      addEventListener(_type, listener) {
        if (!aborted) listeners.add(listener);
      },
      removeEventListener(_type, listener) {
        listeners.delete(listener);
      },
    },
    cancel() {
      if (aborted) return;
      aborted = true;
      const called = [...listeners];
      listeners.clear();
      for (const listener of called) {
        try {
          listener();
        } catch {
          // A listener's own fault must not reach the port's listener this runs in; its call fails by itself.
        }
      }
    },
  };
}
