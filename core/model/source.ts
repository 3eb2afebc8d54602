import type { Axis, TimeAxis } from "./axis";

/** What the height is measured from; decides whether mean jets can be in it. */
export type HeightReference = "geoid" | "mean-sea-level" | "ellipsoid" | "unknown";

/** How many cells each masking rule removed. */
export interface MaskCounts {
  readonly fill: number;
  readonly validRange: number;
  readonly notFinite: number;
}

/** What was recognised in one gridded file. Plain data: crosses process borders. */
export interface GridFileReport {
  readonly kind: "grid";
  readonly path: string;
  readonly format: string;
  readonly title: string;
  readonly height: {
    readonly name: string;
    readonly standardName: string;
    readonly longName: string;
    readonly fileUnits: string;
    /** "standard name", "units", "shape" or "named in the study": which rule found it. */
    readonly foundBy: string;
    readonly reference: HeightReference;
    readonly storedAs: string;
  };
  readonly latitude: Axis;
  readonly longitude: Axis;
  readonly time: TimeAxis;
  /** Largest distance in days between a stored time and the step it was snapped to. */
  readonly timeDeviationDays: number;
  readonly timeUnits: string;
  /** Counts over the first date. */
  readonly masked: MaskCounts;
  readonly bytes: number;
  readonly notes: readonly string[];
}

/** What was recognised in one along-track file. */
export interface TrackFileReport {
  readonly kind: "track";
  readonly path: string;
  readonly format: string;
  readonly title: string;
  readonly height: { readonly name: string; readonly standardName: string; readonly fileUnits: string };
  readonly points: number;
  readonly passes: number;
  readonly firstDay: number;
  readonly lastDay: number;
  readonly calendar: TimeAxis["calendar"];
  readonly box: { readonly west: number; readonly east: number; readonly south: number; readonly north: number };
  readonly bytes: number;
  readonly notes: readonly string[];
}

export type FileReport = GridFileReport | TrackFileReport;

/** Index ranges to read from a joined grid: half-open, in the joined axes' own order. */
export interface GridWindow {
  readonly time: readonly [from: number, to: number];
  readonly latitude: readonly [from: number, to: number];
  /** One range, or two where the region crosses the file's longitude seam (read in this order). */
  readonly longitude: readonly (readonly [from: number, to: number])[];
}
