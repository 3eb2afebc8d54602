import type { Engine, OpenStudy, RecognisedFile } from "../../core/contract/engine";
import type { BenchStore } from "./bench-state";
import { fitCursor } from "./cursor";
import type { Drafts } from "./draft";
import { recordKey } from "./edit-study";
import { commit, startHistory } from "./history";
import { noticeFromError } from "./notices";
import { dataPaths } from "./paths";

/** Opening studies and reading records, one at a time: a newer request aborts the one under way. */
export interface Loader {
  open(paths: readonly string[]): Promise<void>;
  /** Reads the present study's record; the cursor stays at its latitude and date where the record has them. */
  load(): Promise<void>;
  /** What is being read now (see recordKey); empty while nothing is. */
  readonly reading: string;
  /** At the person's wish: the view says so. */
  cancel(): void;
  /** Because what was being read is no longer wanted: as if it had never been asked for. */
  abandon(): void;
}

export interface LoaderParts {
  readonly store: BenchStore;
  readonly engine: Engine;
  readonly drafts: Drafts;
  readonly fail: (error: unknown) => void;
  readonly tell: (heading: string, text: string) => void;
  /** Called when a record has been put in place. */
  readonly loaded: () => void;
}

export function loader({ store, engine, drafts, fail, tell, loaded }: LoaderParts): Loader {
  let running: AbortController | null = null;
  let reading = "";

  const begin = (step: string): AbortController => {
    running?.abort();
    running = new AbortController();
    reading = "";
    store.set({ loading: { step, done: 0, total: 0 }, loadFault: null });
    return running;
  };

  /** Runs one piece of work; errors of overtaken work are nobody's concern any more. */
  const attempt = async (controller: AbortController, work: () => Promise<void>): Promise<void> => {
    try {
      await work();
    } catch (error) {
      if (running !== controller) return;
      const text = noticeFromError(error)?.text ?? "Reading was cancelled.";
      store.set({ loadFault: text });
      fail(error);
    } finally {
      if (running === controller) {
        running = null;
        reading = "";
        store.set({ loading: null });
      }
    }
  };

  const read = async (controller: AbortController): Promise<void> => {
    const { studies, grid } = store.get();
    if (!studies) return;
    const { signal } = controller;
    const onProgress = (loading: { step: string; done: number; total: number }): void => {
      if (running === controller) store.set({ loading });
    };
    const key = recordKey(studies.present, grid);
    reading = key;
    const record = await engine.load({ open: studies.present, grid }, { signal, onProgress });
    if (running !== controller) return;
    const before = store.get();
    const cursor = fitCursor(before.cursor, before.record, record);
    const { cautions, blendedRows } = record;
    store.set({ record, recordFor: key, cautions, blendedRows, cursor });
    loaded();
  };

  const describe = async (controller: AbortController, open: OpenStudy, paths: readonly string[]): Promise<void> => {
    let files: readonly RecognisedFile[] = [];
    try {
      files = await engine.describe({ paths: open.path === "" ? paths : dataPaths(open) });
    } catch (error) {
      if (running === controller) fail(error);
    }
    if (store.get().saved === open) store.set({ files });
  };

  return {
    async open(paths) {
      const controller = begin("Opening");
      await attempt(controller, async () => {
        const open = await engine.open({ paths }, { signal: controller.signal });
        const draft = await checkedDraft(engine, drafts, open);
        if (running !== controller) return;
        const studies = draft ? commit(startHistory(open), draft) : startHistory(open);
        const grid = open.study.grids[0].id;
        store.set({
          studies,
          saved: open,
          grid,
          files: [],
          pathsText: "",
          record: null,
          picture: null,
          spectrum: null,
          noSpectrum: "",
          cursor: null,
        });
        if (draft)
          tell("Unsaved changes are back", "The last edits of this study had not been saved. Undo removes them.");
        void describe(controller, open, paths);
        await read(controller);
      });
    },
    async load() {
      const controller = begin("Reading");
      await attempt(controller, () => read(controller));
    },
    cancel() {
      running?.abort();
    },
    abandon() {
      running?.abort();
      running = null;
      reading = "";
      store.set({ loading: null, loadFault: null });
    },
    get reading() {
      return reading;
    },
  };
}

/** The kept draft of a study if there is one and the engine accepts it. */
async function checkedDraft(engine: Engine, drafts: Drafts, open: OpenStudy): Promise<OpenStudy | null> {
  const kept = drafts.find(open);
  if (kept === null) return null;
  try {
    const study = await engine.check({ study: kept });
    return JSON.stringify(study) === JSON.stringify(open.study) ? null : { ...open, study };
  } catch {
    drafts.forget(open);
    return null;
  }
}
