import type { Engine, OpenStudy } from "../../core/contract/engine";
import type { Progress } from "../../core/contract/job";
import { jetPlaceOn } from "../../core/figure/latitudes/jet-line";
import type { JetsResult } from "../../core/model/jets-result";
import type { BenchState, BenchStore } from "./bench-state";
import { recordKey } from "./edit-study";
import { carriedJet, eddyTestKey, type JetsState, jetsKey, wantsJets } from "./jets-state";
import { latestWins } from "./latest-wins";
import { noticeFromError } from "./notices";

/** Keeps the jets in step with study and grid, and tests them when asked to. */
export interface Jets {
  /** Looks whether the present settings want other jets than were asked for; cheap, for every change of state. */
  refresh(): void;
  /** Lights a jet and moves the cursor's latitude to it; null lights none. */
  pick(id: number | null): void;
  /** Holds the present study's jets against eddies, one test at a time. */
  test(): Promise<void>;
  cancelTest(): void;
}

/** Stillness of a gesture after which jets are looked for while it lasts. */
const stillMs = 250;

interface JetsQuestion {
  readonly open: OpenStudy;
  readonly grid: string;
  readonly key: string;
}

/** What the present state asks for; null where jets are not looked for or the record is not there yet. */
function question({ link, studies, record, recordFor, loading, grid, choice }: BenchState): JetsQuestion | null {
  if (link !== "ready" || !studies || !record || loading) return null;
  const open = studies.present;
  if (!wantsJets(open, choice) || recordFor !== recordKey(open, grid)) return null;
  return { open, grid, key: jetsKey(open, grid) };
}

export function jets(store: BenchStore, engine: Engine): Jets {
  let asked = "";
  let waiting: { readonly question: JetsQuestion; readonly timer: ReturnType<typeof setTimeout> } | null = null;
  let testRunning: AbortController | null = null;
  const change = (part: Partial<JetsState>): void => store.set({ jets: { ...store.get().jets, ...part } });

  const queue = latestWins<JetsQuestion, JetsResult>({
    // Jets of overtaken settings would not be shown.
    patienceMs: 0,
    run: ({ open, grid }, signal) => engine.jets({ open, grid }, { signal }),
    deliver: (result, { open, grid, key }) => {
      const { jets: before, selectedJet } = store.get();
      const isSameStudy = before.found?.open.path === open.path && before.found.open.folder === open.folder;
      const carried = isSameStudy ? carriedJet(before.found?.result.jets ?? [], result.jets, selectedJet) : null;
      const found = { open, grid, key, result };
      store.set({ jets: { ...before, found, finding: false, fault: "" }, selectedJet: carried });
    },
    fail: (error) => {
      const fault = noticeFromError(error)?.text ?? "";
      store.set({ jets: { ...store.get().jets, found: null, finding: false, fault }, selectedJet: null });
    },
  });

  const send = (): void => {
    if (!waiting) return;
    clearTimeout(waiting.timer);
    const next = waiting.question;
    waiting = null;
    queue.ask(next);
  };

  /** Whatever is under way belongs to settings of the past: it would only hold up the picture. */
  const stop = (): void => {
    if (waiting) clearTimeout(waiting.timer);
    waiting = null;
    queue.stop();
  };

  const ask = (next: JetsQuestion, pauseMs: number): void => {
    stop();
    const isThere = store.get().jets.found?.key === next.key;
    if (!isThere) waiting = { question: next, timer: setTimeout(send, pauseMs) };
    change({ finding: !isThere, fault: "", testFault: "" });
  };

  return {
    refresh() {
      const state = store.get();
      const { studies } = state;
      const isHeld = studies !== null && studies.gesture !== null;
      const next = question(state);
      if (!next) {
        if (asked === "") return;
        asked = "";
        stop();
        if (state.jets.finding) change({ finding: false });
      } else if (next.key !== asked) {
        asked = next.key;
        ask(next, isHeld ? stillMs : 0);
      } else if (waiting && !isHeld) send();
    },
    pick(id) {
      const { jets: now, cursor } = store.get();
      const jet = now.found?.result.jets.find((each) => each.id === id);
      if (!jet || !cursor) {
        store.set({ selectedJet: null });
        return;
      }
      const { latitude } = jetPlaceOn(jet, cursor.dateIndex);
      store.set({ selectedJet: jet.id, cursor: { ...cursor, latitude } });
    },
    async test() {
      const { studies, grid } = store.get();
      if (!studies) return;
      testRunning?.abort();
      const controller = new AbortController();
      testRunning = controller;
      const open = studies.present;
      change({ testing: { step: "Looking for jets", done: 0, total: 0 }, testFault: "" });
      try {
        const onProgress = (testing: Progress): void => {
          if (testRunning === controller) change({ testing });
        };
        const result = await engine.eddyTest({ open, grid }, { signal: controller.signal, onProgress });
        if (testRunning === controller) change({ tested: { settings: eddyTestKey(open.study.eddyTest), result } });
      } catch (error) {
        if (testRunning === controller) change({ testFault: noticeFromError(error)?.text ?? "" });
      } finally {
        if (testRunning === controller) {
          testRunning = null;
          change({ testing: null });
        }
      }
    },
    cancelTest() {
      testRunning?.abort();
    },
  };
}
