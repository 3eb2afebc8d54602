import type { Engine, OpenStudy, SuppliedVelocityReport } from "../../core/contract/engine";
import type { BenchStore } from "./bench-state";
import { recordKey } from "./edit-study";

/** How the velocities in a grid's files agree with ours; null where the files hold none. */
export interface Comparison {
  /** What was compared (see comparisonKey): the numbers hold for nothing else. */
  readonly key: string;
  readonly report: SuppliedVelocityReport | null;
}

/** Compares supplied velocities when asked to, one comparison at a time. */
export interface Velocities {
  compare(): Promise<void>;
  cancel(): void;
}

/** Names the record and the way currents are computed: all that a comparison depends on. */
export function comparisonKey(open: OpenStudy, grid: string): string {
  return JSON.stringify([recordKey(open, grid), open.study.geostrophy]);
}

export function velocities(store: BenchStore, engine: Engine, fail: (error: unknown) => void): Velocities {
  let running: AbortController | null = null;
  return {
    async compare() {
      const { studies, grid } = store.get();
      if (!studies) return;
      running?.abort();
      const controller = new AbortController();
      running = controller;
      const open = studies.present;
      store.set({ comparing: { step: "Comparing", done: 0, total: 0 } });
      try {
        const report = await engine.velocities(
          { open, grid },
          {
            signal: controller.signal,
            onProgress: (comparing) => {
              if (running === controller) store.set({ comparing });
            },
          },
        );
        if (running === controller) store.set({ comparison: { key: comparisonKey(open, grid), report } });
      } catch (error) {
        if (running === controller) fail(error);
      } finally {
        if (running === controller) {
          running = null;
          store.set({ comparing: null });
        }
      }
    },
    cancel() {
      running?.abort();
    },
  };
}
