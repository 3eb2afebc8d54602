import type { Engine } from "../../core/contract/engine";
import type { BenchStore } from "./bench-state";
import type { Drafts } from "./draft";

/** Writing to disk: the study itself and its results. */
export interface Results {
  save(path: string): Promise<boolean>;
  write(folder: string, overwrite: boolean): Promise<boolean>;
  cancel(): void;
}

/** Each answers true when it is done; faults become notices. */
export function results(
  store: BenchStore,
  engine: Engine,
  drafts: Drafts,
  fail: (error: unknown) => void,
  tell: (heading: string, text: string) => void,
): Results {
  let running: AbortController | null = null;
  return {
    async save(path) {
      const open = store.get().studies?.present;
      if (!open) return false;
      try {
        const place = await engine.save({ open, path });
        drafts.forget(open);
        store.set({ saved: open });
        tell("Study saved", place.path);
        return true;
      } catch (error) {
        fail(error);
        return false;
      }
    },
    async write(folder, overwrite) {
      const open = store.get().studies?.present;
      if (!open || running) return false;
      const controller = new AbortController();
      running = controller;
      store.set({ writing: { step: "Starting", done: 0, total: 0 } });
      try {
        const onProgress = (writing: { step: string; done: number; total: number }): void => store.set({ writing });
        const place = await engine.run({ open, folder, overwrite }, { signal: controller.signal, onProgress });
        tell("Results written", `${place.files.length} files in ${place.folder}`);
        return true;
      } catch (error) {
        fail(error);
        return false;
      } finally {
        running = null;
        store.set({ writing: null });
      }
    },
    cancel() {
      running?.abort();
    },
  };
}
