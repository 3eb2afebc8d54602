import type { BenchStore } from "./bench-state";

export interface Player {
  toggle(): void;
  stop(): void;
}

const frameMs = 120;

/**
 * Plays the dates: one date a frame, waiting where the engine has not answered yet so that no frame is skipped unseen.
 * Stops at the last date; started there, it begins again at the first.
 */
export function player(store: BenchStore, busy: () => boolean, setDate: (index: number) => void): Player {
  let timer: ReturnType<typeof setInterval> | null = null;

  const stop = (): void => {
    if (timer !== null) clearInterval(timer);
    timer = null;
    if (store.get().playing) store.set({ playing: false });
  };

  const advance = (): void => {
    const { cursor, record } = store.get();
    const last = (record?.time.values.length ?? 0) - 1;
    if (!cursor || cursor.dateIndex >= last) stop();
    else if (!busy()) setDate(cursor.dateIndex + 1);
  };

  const start = (): void => {
    const { cursor, record } = store.get();
    if (!cursor || !record) return;
    if (cursor.dateIndex >= record.time.values.length - 1) setDate(0);
    store.set({ playing: true });
    timer = setInterval(advance, frameMs);
  };

  return {
    stop,
    toggle() {
      if (timer !== null) stop();
      else start();
    },
  };
}
