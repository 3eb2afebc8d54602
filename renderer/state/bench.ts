import { createStore, type StoreApi } from "zustand/vanilla";
import type { FieldChoice, OpenStudy } from "../../core/contract/engine";
import type { EngineLink } from "../bridge/engine-link";
import { type BandEdge, moveEdge, recordLimits } from "./band-edges";
import { type BenchState, type BenchStore, firstState } from "./bench-state";
import { clampIndex, stepLatitude } from "./cursor";
import { type Drafts, throttled } from "./draft";
import { recordKey, withBand } from "./edit-study";
import { fields } from "./fields";
import { commit, endGesture, type History, redo, undo } from "./history";
import { type Jets, jets } from "./jets";
import { type Loader, loader } from "./loader";
import { addNotice, engineStopped, noticeFromError } from "./notices";
import { player } from "./player";
import { type Results, results } from "./results";
import { type Scales, scales } from "./scales";
import { type Velocities, velocities } from "./velocities";

/** The store and everything a person can do with it. */
export interface Bench {
  readonly store: StoreApi<BenchState>;
  readonly loader: Loader;
  readonly results: Results;
  readonly velocities: Velocities;
  readonly jets: Jets;
  readonly scales: Scales;
  readonly link: EngineLink;
  set(change: Partial<BenchState>): void;
  /** Makes `next` the present study; changes of one gesture are one step of undo. */
  edit(next: OpenStudy, gesture?: string): void;
  endGesture(): void;
  undo(): void;
  redo(): void;
  chooseGrid(grid: string): void;
  chooseField(change: Partial<FieldChoice>): void;
  setLatitude(latitude: number): void;
  stepLatitude(steps: number): void;
  setDate(index: number): void;
  stepDate(steps: number): void;
  setEdge(edge: BandEdge, days: number, gesture?: string): void;
  togglePlay(): void;
  setColumns(columns: number): void;
  dismiss(id: number): void;
  fail(error: unknown): void;
}

const draftPauseMs = 500;

/** Connects at once; the paths the door was started with are opened as soon as the engine answers. */
export function createBench(link: EngineLink, drafts: Drafts): Bench {
  const zustand = createStore<BenchState>(() => firstState);
  const store: BenchStore = { get: zustand.getState, set: (change) => zustand.setState(change) };
  const keepDraft = throttled((open: OpenStudy) => drafts.keep(open), draftPauseMs);

  const tell = (heading: string, text: string): void => {
    store.set({ notices: addNotice(store.get().notices, { kind: "news", heading, text }) });
  };
  const fail = (error: unknown): void => {
    // While the engine is away every call fails for that one reason, which has its own notice.
    const notice = store.get().link === "ready" ? noticeFromError(error) : null;
    if (notice) store.set({ notices: addNotice(store.get().notices, notice) });
  };

  const drawn = fields(store, link.engine, fail);
  const reading = loader({ store, engine: link.engine, drafts, fail, tell, loaded: () => drawn.refresh() });
  const writing = results(store, link.engine, drafts, tell);
  const comparing = velocities(store, link.engine, fail);
  const measuring = scales(store, link.engine);
  const following = jets(store, link.engine);
  zustand.subscribe(() => following.refresh());

  const setDate = (index: number): void => {
    const { cursor, record } = store.get();
    if (!cursor || !record) return;
    const dateIndex = clampIndex(index, record.time.values.length);
    if (dateIndex === cursor.dateIndex) return;
    store.set({ cursor: { ...cursor, dateIndex } });
    drawn.refresh();
  };
  const playing = player(store, () => drawn.busy, setDate);

  /** Puts a history in place and asks for what the new present needs. */
  const adopt = (next: History<OpenStudy>): void => {
    const before = store.get().studies;
    if (!before || next === before) return;
    store.set({ studies: next });
    if (next.present === before.present) {
      drawn.refresh();
      return;
    }
    keepDraft(next.present);
    const { grids } = next.present.study;
    if (!grids.some((grid) => grid.id === store.get().grid)) store.set({ grid: grids[0].id });
    const key = recordKey(next.present, store.get().grid);
    if (key === store.get().recordFor) {
      reading.abandon();
      drawn.refresh();
    } else if (key !== reading.reading) void reading.load();
  };
  const change = (step: (studies: History<OpenStudy>) => History<OpenStudy>): void => {
    const { studies } = store.get();
    if (studies) adopt(step(studies));
  };

  link.start({
    onState(state) {
      const { link: before } = store.get();
      store.set({ link: state });
      if (state !== "lost" || before !== "ready") return;
      playing.stop();
      drawn.stop();
      measuring.stop();
      tell(engineStopped, "It is being started again. Nothing you set is lost.");
    },
    onEngine(welcome, again) {
      store.set({ door: welcome.door });
      const { studies } = store.get();
      if (!studies) {
        if (welcome.paths.length > 0) void reading.open(welcome.paths);
        return;
      }
      if (again) restore();
    },
    onOpened: (paths) => void reading.open(paths),
  });

  /** A new engine has forgotten its records: the present study's is read again. */
  const restore = (): void => {
    playing.stop();
    drawn.stop();
    store.set({ notices: store.get().notices.filter((notice) => notice.heading !== engineStopped) });
    tell(
      "The engine was started again",
      "Your study is open as you left it; its record is read again. Results that were being written must be started again.",
    );
    void reading.load();
  };

  return {
    store: zustand,
    loader: reading,
    results: writing,
    velocities: comparing,
    scales: measuring,
    jets: following,
    link,
    set: store.set,
    edit: (next, gesture) => change((studies) => commit(studies, next, gesture ?? null)),
    endGesture: () => change(endGesture),
    undo: () => change(undo),
    redo: () => change(redo),
    chooseGrid(grid) {
      if (grid === store.get().grid) return;
      store.set({ grid });
      void reading.load();
    },
    chooseField(part) {
      store.set({ choice: { ...store.get().choice, ...part } });
      drawn.refresh();
    },
    setLatitude(latitude) {
      const { cursor } = store.get();
      if (cursor && latitude !== cursor.latitude) store.set({ cursor: { ...cursor, latitude } });
    },
    stepLatitude(steps) {
      const { cursor, record } = store.get();
      if (!cursor || !record) return;
      store.set({ cursor: { ...cursor, latitude: stepLatitude(record.latitude.values, cursor.latitude, steps) } });
    },
    setDate,
    stepDate: (steps) => setDate((store.get().cursor?.dateIndex ?? 0) + steps),
    setEdge(edge, days, gesture) {
      const { studies, record } = store.get();
      if (!studies || !record) return;
      const open = studies.present;
      const band = moveEdge(open.study.band, edge, days, recordLimits(record.time));
      change((history) => commit(history, withBand(open, band), gesture ?? null));
    },
    togglePlay: () => playing.toggle(),
    setColumns(columns) {
      if (columns === store.get().columns) return;
      store.set({ columns });
      drawn.refresh();
    },
    dismiss: (id) => store.set({ notices: store.get().notices.filter((notice) => notice.id !== id) }),
    fail,
  };
}
