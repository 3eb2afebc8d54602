import type { Engine } from "../../core/contract/engine";
import type { BenchStore } from "./bench-state";
import type { Drafts } from "./draft";
import { noticeFromError } from "./notices";

/** Writing to disk: the study itself and its results. Each settles with null when done, else with why not, in sentences. */
export interface Results {
  save(path: string): Promise<string | null>;
  write(folder: string, overwrite: boolean): Promise<string | null>;
  cancel(): void;
}

const nothingOpen = "No study is open.";

export function results(
  store: BenchStore,
  engine: Engine,
  drafts: Drafts,
  tell: (heading: string, text: string) => void,
): Results {
  let running: AbortController | null = null;

  const attempt = async (work: () => Promise<void>): Promise<string | null> => {
    try {
      await work();
      return null;
    } catch (error) {
      return noticeFromError(error)?.text ?? "Stopped; nothing was written.";
    }
  };

  return {
    async save(path) {
      const open = store.get().studies?.present;
      if (!open) return nothingOpen;
      return attempt(async () => {
        const place = await engine.save({ open, path });
        drafts.forget(open);
        store.set({ saved: open });
        tell("Study saved", place.path);
      });
    },
    async write(folder, overwrite) {
      const open = store.get().studies?.present;
      if (!open) return nothingOpen;
      const controller = new AbortController();
      running = controller;
      store.set({ writing: { step: "Starting", done: 0, total: 0 } });
      const fault = await attempt(async () => {
        const onProgress = (writing: { step: string; done: number; total: number }): void => store.set({ writing });
        const place = await engine.run({ open, folder, overwrite }, { signal: controller.signal, onProgress });
        tell("Results written", `${place.files.length} files in ${place.folder}`);
      });
      running = null;
      store.set({ writing: null });
      return fault;
    },
    cancel() {
      running?.abort();
    },
  };
}
