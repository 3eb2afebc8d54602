import type {
  Caution,
  FieldChoice,
  LatitudesResult,
  OpenStudy,
  RecognisedFile,
  RecordOverview,
  SpectrumResult,
} from "../../core/contract/engine";
import type { Progress } from "../../core/contract/job";
import type { DoorKind } from "../../core/contract/wire";
import type { LinkState } from "../bridge/engine-link";
import type { Cursor } from "./cursor";
import type { History } from "./history";
import { type JetsState, noJets } from "./jets-state";
import type { Notice } from "./notices";
import type { Comparison } from "./velocities";

/** A result together with the study and record it came from, so that what is drawn is always of one piece. */
export interface Picture {
  readonly open: OpenStudy;
  readonly grid: string;
  readonly record: RecordOverview;
  readonly result: LatitudesResult;
}

export interface BenchState {
  readonly link: LinkState;
  /** Which way the engine is reached; null until it has answered. */
  readonly door: DoorKind | null;
  readonly view: string;
  readonly studies: History<OpenStudy> | null;
  /** The study as it is on disk; differs from the present one where there are edits to save. */
  readonly saved: OpenStudy | null;
  readonly files: readonly RecognisedFile[];
  readonly grid: string;
  readonly choice: FieldChoice;
  readonly cursor: Cursor | null;
  readonly playing: boolean;
  readonly record: RecordOverview | null;
  /** What the record was read for (see recordKey): nothing is computed on the axes of another one. */
  readonly recordFor: string;
  /** Follow the settings, which change more often than the record. */
  readonly cautions: readonly Caution[];
  readonly picture: Picture | null;
  readonly spectrum: SpectrumResult | null;
  /** Why the record has no spectrum, as a sentence; empty where it has one. */
  readonly noSpectrum: string;
  /** Rows blended across the equator; follow the settings as the cautions do. */
  readonly blendedRows: Uint8Array | null;
  /** The last comparison of supplied velocities with ours. */
  readonly comparison: Comparison | null;
  /** A comparison under way. */
  readonly comparing: Progress | null;
  readonly jets: JetsState;
  /** Id of the jet lit in every panel, among those found. */
  readonly selectedJet: number | null;
  /** The picture is behind what was asked for. */
  readonly computing: boolean;
  /** Where that computing stands, once it tells. */
  readonly computingStep: Progress | null;
  /** Opening and reading; null when nothing is under way. */
  readonly loading: Progress | null;
  /** Why there is no record, as a sentence; null while all is well. */
  readonly loadFault: string | null;
  readonly writing: Progress | null;
  readonly notices: readonly Notice[];
  /** Most columns the latitude-time picture can show. */
  readonly columns: number;
  readonly keysShown: boolean;
  /** Ids of the settings sections that are open. */
  readonly openSections: readonly string[];
  /** Paths typed to be opened; kept while the view changes, so that a slip can be mended. */
  readonly pathsText: string;
}

export const firstState: BenchState = {
  link: "connecting",
  door: null,
  view: "latitudes",
  studies: null,
  saved: null,
  files: [],
  grid: "",
  choice: { quantity: "u", inBand: true },
  cursor: null,
  playing: false,
  record: null,
  recordFor: "",
  cautions: [],
  picture: null,
  spectrum: null,
  noSpectrum: "",
  blendedRows: null,
  comparison: null,
  comparing: null,
  jets: noJets,
  selectedJet: null,
  computing: false,
  computingStep: null,
  loading: null,
  loadFault: null,
  writing: null,
  notices: [],
  columns: 600,
  keysShown: false,
  openSections: [],
  pathsText: "",
};

/** What the parts of the bench share: reading and replacing the state, and the engine's calls. */
export interface BenchStore {
  get(): BenchState;
  set(change: Partial<BenchState>): void;
}
