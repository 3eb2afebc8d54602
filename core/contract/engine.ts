import type { Axis, TimeAxis } from "../model/axis";
import type { FaultData } from "../model/errors";
import type { EddyTestResult, JetsResult } from "../model/jets-result";
import type {
  BandResponse,
  FieldError,
  Plane,
  Profile,
  SpectrumResult,
  SuppliedVelocityReport,
} from "../model/results";
import type { ScalesResult } from "../model/scales-result";
import type { FileReport } from "../model/source";
import type { Study } from "../study/schema";
import type { CallOptions } from "./job";

export type { BandResponse, FieldError, Plane, Profile, SpectrumResult, SuppliedVelocityReport };

/** A study with the folder its relative paths start from. */
export interface OpenStudy {
  readonly study: Study;
  readonly folder: string;
  /** File it was read from; empty for one made on the spot from data files. */
  readonly path: string;
}

export type RecognisedFile =
  | { readonly path: string; readonly report: FileReport }
  | { readonly path: string; readonly refused: FaultData };

/** Which field a view shows. */
export interface FieldChoice {
  /** A quantity's id from core/ocean/quantities. */
  readonly quantity: string;
  /** Through the study's band, or as it stands (mean and all). */
  readonly inBand: boolean;
}

/** What the loaded record is: axes after cutting to region and period. */
export interface RecordOverview {
  readonly latitude: Axis;
  readonly longitude: Axis;
  /** Regular time axis: missing dates are present and marked. */
  readonly time: TimeAxis;
  /** 1 where the date has at least one valid cell. */
  readonly hasData: Uint8Array;
  /** Share of non-land cells valid, by date. */
  readonly coverage: Float64Array;
  /** 1 where the cell is valid on at least one date. Row-major latitude × longitude. */
  readonly ocean: Uint8Array;
  readonly timeDeviationDays: number;
  /** 1 on rows whose velocities come (more than 1 %) from the blend across the equator. */
  readonly blendedRows: Uint8Array;
  readonly cautions: readonly Caution[];
  /** Bytes the record takes in memory. */
  readonly bytes: number;
}

export interface Caution {
  readonly id: string;
  /** A sentence with its numbers. */
  readonly text: string;
}

/** Everything the Latitudes view draws for one field, date and band. SI units throughout. */
export interface LatitudesResult {
  readonly choice: FieldChoice;
  readonly dateIndex: number;
  readonly map: Plane;
  /** Zonal mean of the map on the date. */
  readonly onDate: Float64Array;
  /** Mean over the period of the zonal means. */
  readonly profile: Profile;
  /** Columns are dates, thinned to at most the columns asked for; `columnDates` are indices into the time axis. */
  readonly latitudeTime: Plane;
  readonly columnDates: Int32Array;
  /** Dates whose filtered value rests on less than 90 % of the filter's weight. 1 = filter end or gap, by date. */
  readonly filterEnd: Uint8Array;
  /** Colour limits of the map, in SI units: the same for every date of the field, so that time can play. */
  readonly limits: readonly [number, number];
  /** Colour limits of the latitude–time picture: zonal means are weaker than the map they average. */
  readonly pictureLimits: readonly [number, number];
  readonly response: BandResponse;
  /**
   * What the study's height error makes of the field; null where the study names none or the quantity is not height, u, v,
   * vorticity or vorticity over f. In the band, errors of different dates count as independent.
   */
  readonly error: FieldError | null;
}

export interface RunSummaryPlace {
  readonly folder: string;
  readonly files: readonly string[];
}

/**
 * What the engine does. One interface types server and client alike. Every call may be cancelled; long ones report progress.
 * Errors arrive as Fault.
 */
export interface Engine {
  /** Reads a *.study.json, or makes a study around the data files named. */
  open(request: { readonly paths: readonly string[] }, options?: CallOptions): Promise<OpenStudy>;
  /** What is in the files, each recognised or refused with its reason. */
  describe(request: { readonly paths: readonly string[] }, options?: CallOptions): Promise<readonly RecognisedFile[]>;
  /** Checks the study and repairs nothing silently; returns it with every default written out. */
  check(request: { readonly study: unknown }, options?: CallOptions): Promise<Study>;
  /** Loads the record of one grid. Kept until another record is asked for. */
  load(request: { readonly open: OpenStudy; readonly grid: string }, options?: CallOptions): Promise<RecordOverview>;
  latitudes(
    request: {
      readonly open: OpenStudy;
      readonly grid: string;
      readonly choice: FieldChoice;
      readonly dateIndex: number;
      readonly columns: number;
    },
    options?: CallOptions,
  ): Promise<LatitudesResult>;
  spectrum(
    request: { readonly open: OpenStudy; readonly grid: string; readonly quantity: string },
    options?: CallOptions,
  ): Promise<SpectrumResult>;
  /** Compares the velocities that the files supply with ours; null where they supply none. */
  velocities(
    request: { readonly open: OpenStudy; readonly grid: string },
    options?: CallOptions,
  ): Promise<SuppliedVelocityReport | null>;
  /** Finds and follows the jets of the record in the study's band. */
  jets(request: { readonly open: OpenStudy; readonly grid: string }, options?: CallOptions): Promise<JetsResult>;
  /** Holds those jets against random oceans of passing eddies. Long; the same seed gives the same answer. */
  eddyTest(
    request: { readonly open: OpenStudy; readonly grid: string },
    options?: CallOptions,
  ): Promise<EddyTestResult>;
  /** Spectra, lengths, drift, forcing and persistence; `latitude` chooses the row for waves and drift, the middle one if left out. */
  scales(
    request: { readonly open: OpenStudy; readonly grid: string; readonly latitude?: number },
    options?: CallOptions,
  ): Promise<ScalesResult>;
  /** Writes the result folder, whole or not at all. */
  run(
    request: { readonly open: OpenStudy; readonly folder: string; readonly overwrite: boolean },
    options?: CallOptions,
  ): Promise<RunSummaryPlace>;
  /** Saves the study beside its data; atomic. */
  save(
    request: { readonly open: OpenStudy; readonly path: string },
    options?: CallOptions,
  ): Promise<{ readonly path: string }>;
}

export type EngineMethod = keyof Engine;
