import type { Engine, LatitudesResult, OpenStudy, RecordOverview, SpectrumResult } from "../../core/contract/engine";
import { counted } from "../../core/figure/format";
import type { BenchStore } from "./bench-state";
import { recordKey } from "./edit-study";
import { latestWins } from "./latest-wins";
import { isFaultData } from "./notices";

/** Keeps the drawn results in step with study, field choice and date. */
export interface Fields {
  /** Asks for whatever the present state lacks. */
  refresh(): void;
  stop(): void;
  readonly busy: boolean;
}

interface LatitudesQuestion {
  readonly open: OpenStudy;
  readonly record: RecordOverview;
  readonly request: Parameters<Engine["latitudes"]>[0];
}

/** A picture while dragging comes well within this; what takes longer is not worth finishing for a setting that has gone. */
const patienceMs = 1500;

/** One queue for the latitudes, one for the spectrum; each keeps at most one call in flight. */
export function fields(store: BenchStore, engine: Engine, fail: (error: unknown) => void): Fields {
  let asked = "";
  let askedStudy: OpenStudy | null = null;
  let askedRecord: RecordOverview | null = null;
  let askedSpectrum = "";
  let cautioned: OpenStudy | null = null;
  let cautionedRecord: RecordOverview | null = null;

  const latitudes = latestWins<LatitudesQuestion, LatitudesResult>({
    patienceMs,
    run: ({ request }, signal) =>
      engine.latitudes(request, {
        signal,
        onProgress: (step) => {
          if (!signal.aborted) store.set({ computingStep: step });
        },
      }),
    deliver: (result, { open, record, request }) => {
      if (record === store.get().record) store.set({ picture: { open, grid: request.grid, record, result } });
    },
    fail: (error) => {
      asked = "";
      fail(error);
    },
    onBusy: (computing) => store.set({ computing, computingStep: null }),
  });

  const spectrum = latestWins<Parameters<Engine["spectrum"]>[0], SpectrumResult>({
    patienceMs,
    run: (request, signal) => engine.spectrum(request, { signal }),
    deliver: (result) => {
      const isWhole = result.segments > 0;
      const noSpectrum = `No spectrum: gaps leave no ${counted(result.segmentDays, "day")} in a row.`;
      store.set({ spectrum: isWhole ? result : null, noSpectrum: isWhole ? "" : noSpectrum });
    },
    fail: (error) => {
      const missing = missingSpectrum(error);
      if (missing !== null) {
        store.set({ spectrum: null, noSpectrum: missing });
        return;
      }
      askedSpectrum = "";
      fail(error);
    },
  });

  const cautions = latestWins<Parameters<Engine["load"]>[0], RecordOverview>({
    patienceMs,
    run: (request, signal) => engine.load(request, { signal }),
    deliver: (overview, { open }) => {
      if (open !== store.get().studies?.present) return;
      store.set({ cautions: overview.cautions, blendedRows: overview.blendedRows });
    },
    fail,
  });

  const refreshLatitudes = (open: OpenStudy, record: RecordOverview): void => {
    const { grid, choice, cursor, columns } = store.get();
    if (!cursor) return;
    const key = JSON.stringify([grid, choice, cursor.dateIndex, columns]);
    if (key === asked && open === askedStudy && record === askedRecord) return;
    asked = key;
    askedStudy = open;
    askedRecord = record;
    latitudes.ask({ open, record, request: { open, grid, choice, dateIndex: cursor.dateIndex, columns } });
  };

  const refreshSpectrum = (open: OpenStudy): void => {
    const { grid, choice } = store.get();
    const key = spectrumKey(open, grid, choice.quantity);
    if (key === askedSpectrum) return;
    askedSpectrum = key;
    spectrum.ask({ open, grid, quantity: choice.quantity });
  };

  /** Cautions depend on the settings; asked for when a gesture has ended, not on its way. */
  const refreshCautions = (open: OpenStudy, record: RecordOverview): void => {
    if (open === cautioned) return;
    cautioned = open;
    // A record that has just been read brought its cautions along.
    if (record === cautionedRecord) cautions.ask({ open, grid: store.get().grid });
    cautionedRecord = record;
  };

  return {
    refresh() {
      const { studies, record, recordFor, grid } = store.get();
      if (!studies || !record || recordFor !== recordKey(studies.present, grid)) return;
      refreshLatitudes(studies.present, record);
      refreshSpectrum(studies.present);
      if (studies.gesture === null) refreshCautions(studies.present, record);
    },
    stop() {
      latitudes.stop();
      spectrum.stop();
      cautions.stop();
      cautioned = null;
      cautionedRecord = null;
      asked = "";
      askedStudy = null;
      askedSpectrum = "";
    },
    get busy() {
      return latitudes.busy;
    },
  };
}

/** A record that cannot have a spectrum is no fault of the person's: a sentence for its panel; null for other errors. */
function missingSpectrum(error: unknown): string | null {
  return isFaultData(error) && error.where === "spectrum" ? `No spectrum: it takes ${error.expected}.` : null;
}

/** What a spectrum may depend on: not on band or errors, so that dragging an edge does not ask for it again. */
function spectrumKey(open: OpenStudy, grid: string, quantity: string): string {
  const { band: _band, errors: _errors, outputs: _outputs, title: _title, ...rest } = open.study;
  return JSON.stringify([open.folder, rest, grid, quantity]);
}
