import { createStore, type StoreApi } from "zustand/vanilla";
import type { Engine, OpenStudy, RecordOverview } from "../../core/contract/engine";
import type { Progress } from "../../core/contract/job";
import type { ScalesPart } from "../../core/figure/scales-figure";
import type { ScalesResult } from "../../core/model/scales-result";
import type { BenchStore } from "./bench-state";
import { recordKey } from "./edit-study";
import { noticeFromError } from "./notices";

/** Scales with the study, grid and record they came from. */
export interface ScalesPicture {
  /** See scalesKey: the scales hold for nothing else. */
  readonly key: string;
  readonly open: OpenStudy;
  readonly grid: string;
  readonly record: RecordOverview;
  readonly result: ScalesResult;
}

export interface ScalesState {
  readonly picture: ScalesPicture | null;
  /** Where the work stands; null while nothing is computed. */
  readonly progress: Progress | null;
  /** Why there are none for the present settings, in sentences; empty while all is well. */
  readonly fault: string;
  /** What the present settings ask for; empty before the view was ever opened. */
  readonly wanted: string;
  /** Row for waves and drift; null for the middle one. */
  readonly latitude: number | null;
  /** The page that the person chose; null leaves it to the room there is. */
  readonly part: ScalesPart | null;
}

/** Scales of the flow, computed when somebody looks at them. */
export interface Scales {
  readonly store: StoreApi<ScalesState>;
  /** Asks for what the present settings lack; whatever was computed for others is aborted. */
  refresh(): void;
  /** Stops at the person's wish; nothing is computed until settings change or `again` is called. */
  cancel(): void;
  again(): void;
  /** Because the engine is gone. */
  stop(): void;
  setLatitude(latitude: number | null): void;
  choosePart(part: ScalesPart): void;
}

const cancelled = "The computation was stopped.";

/** Names all that scales depend on: what changes only files, tracks or the eddy test leaves them standing. */
export function scalesKey(open: OpenStudy, grid: string, latitude: number | null): string {
  const { geostrophy, background, space, band, errors, jets, scales } = open.study;
  return JSON.stringify([recordKey(open, grid), geostrophy, background, space, band, errors, jets, scales, latitude]);
}

/** One call at a time; a newer question aborts the one under way, since its answer takes seconds and is out of date. */
export function scales(bench: BenchStore, engine: Engine): Scales {
  const store = createStore<ScalesState>(() => ({
    picture: null,
    progress: null,
    fault: "",
    wanted: "",
    latitude: null,
    part: null,
  }));
  let running: AbortController | null = null;

  const abort = (): void => {
    running?.abort();
    running = null;
  };

  const compute = async (key: string, open: OpenStudy, grid: string, record: RecordOverview): Promise<void> => {
    abort();
    const controller = new AbortController();
    running = controller;
    store.setState({ wanted: key, fault: "", progress: { step: "Starting", done: 0, total: 0 } });
    const isCurrent = (): boolean => running === controller;
    const { latitude } = store.getState();
    try {
      const result = await engine.scales(latitude === null ? { open, grid } : { open, grid, latitude }, {
        signal: controller.signal,
        onProgress: (progress) => {
          if (isCurrent()) store.setState({ progress });
        },
      });
      if (isCurrent()) store.setState({ picture: { key, open, grid, record, result } });
    } catch (error) {
      if (!isCurrent()) return;
      store.setState({ fault: noticeFromError(error)?.text ?? cancelled });
    }
    if (!isCurrent()) return;
    running = null;
    store.setState({ progress: null });
  };

  /** The study, grid and record to compute for; null while they are not there or not of one piece. */
  const question = () => {
    const { link, studies, record, recordFor, loading, grid } = bench.get();
    if (link !== "ready" || !studies || !record || loading) return null;
    const open = studies.present;
    return recordFor === recordKey(open, grid) ? { open, grid, record } : null;
  };

  const refresh = (): void => {
    const asked = question();
    if (!asked) return;
    const { open, grid, record } = asked;
    dropForeign(open);
    const { latitude, picture, wanted } = store.getState();
    if (latitude !== null && !isInside(latitude, record)) store.setState({ latitude: null });
    const key = scalesKey(open, grid, store.getState().latitude);
    if (key === wanted && (running || store.getState().fault !== "" || picture?.key === key)) return;
    if (picture?.key === key) {
      abort();
      store.setState({ wanted: key, fault: "", progress: null });
      return;
    }
    void compute(key, open, grid, record);
  };

  /** The scales of another study would be no more than a riddle. */
  const dropForeign = (open: OpenStudy): void => {
    const shown = store.getState().picture?.open;
    if (shown && (shown.path !== open.path || shown.folder !== open.folder)) store.setState({ picture: null });
  };

  return {
    store,
    refresh,
    cancel() {
      if (!running) return;
      abort();
      store.setState({ progress: null, fault: cancelled });
    },
    again() {
      store.setState({ wanted: "", fault: "" });
      refresh();
    },
    stop() {
      abort();
      store.setState({ progress: null, wanted: "" });
    },
    setLatitude(latitude) {
      if (latitude === store.getState().latitude) return;
      store.setState({ latitude });
      refresh();
    },
    choosePart: (part) => store.setState({ part }),
  };
}

function isInside(latitude: number, { latitude: { values } }: RecordOverview): boolean {
  return latitude >= Math.min(...values) && latitude <= Math.max(...values);
}
