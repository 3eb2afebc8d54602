import type { Progress } from "./job";

const windowMilliseconds = 1000;
/** Most progress messages of one call in a second. */
export const mostProgressASecond = 20;
const gapMilliseconds = windowMilliseconds / mostProgressASecond;

export interface ProgressThrottle {
  report(progress: Progress): void;
  /** Sends the last report held back, if any; to be called before the call is answered. */
  flush(): void;
}

/**
 * Passes at most 20 reports a second to `send`. The first report of a step passes at once while the second's share
 * lasts, others with 50 ms between them; the latest held back passes on flush. `now` is a clock in milliseconds: core has
 * no timers, so a report held back waits for the next one or the answer.
 */
export function throttleProgress(send: (progress: Progress) => void, now: () => number): ProgressThrottle {
  let windowStart = Number.NEGATIVE_INFINITY;
  let sentInWindow = 0;
  let lastSent = Number.NEGATIVE_INFINITY;
  let lastStep: string | undefined;
  let held: Progress | undefined;
  return {
    report(progress) {
      const time = now();
      if (time - windowStart >= windowMilliseconds) {
        windowStart = time;
        sentInWindow = 0;
      }
      const isDue = progress.step !== lastStep || time - lastSent >= gapMilliseconds;
      if (!isDue || sentInWindow >= mostProgressASecond) {
        held = progress;
        return;
      }
      held = undefined;
      sentInWindow += 1;
      lastSent = time;
      lastStep = progress.step;
      send(progress);
    },
    flush() {
      if (held) send(held);
      held = undefined;
    },
  };
}
