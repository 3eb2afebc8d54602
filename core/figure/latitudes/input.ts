import type { Axis, TimeAxis } from "../../model/axis";
import type { BandResponse, FieldError, Plane, Profile, SpectrumResult } from "../../model/results";
import type { JetLine } from "./jet-line";

/** What the figure of the latitude row is drawn from. SI units throughout. */
export interface LatitudesInput {
  readonly record: RecordAxes;
  readonly result: LatitudesValues;
  /** Left out: the period panel shows the band and its response alone. */
  readonly spectrum?: Pick<SpectrumResult, "frequency" | "density">;
  /** Why there is no spectrum, in a sentence for its panel. */
  readonly spectrumNote?: string;
  readonly quantity: {
    readonly title: string;
    /** SI units as CF writes them. */
    readonly units: string;
    /** Signed quantities get the diverging colour map. */
    readonly signed: boolean;
  };
  /** The band of the result. null: that side of it is open. */
  readonly band: {
    readonly shortestDays: number | null;
    readonly longestDays: number | null;
    readonly filter: string;
    /** Butterworth only. */
    readonly order?: number;
    /** Gaps up to this long are bridged, and drawn as such. Left out: none is. */
    readonly bridgeDays?: number;
  };
  /** Edges drawn on the period panel where they run ahead of the result. Left out: those of the result's band. */
  readonly heldBand?: BandEdges;
  /** Jets drawn over the latitude-time picture. Empty: none, but their labels' room is kept; left out: no room either. */
  readonly jets?: readonly JetLine[];
  /** Id of the jet that is lit in every panel. */
  readonly selectedJet?: number | null;
  /** What the standard errors come from, "a 2 cm height error"; wanted where the result has errors. */
  readonly errorSource?: string;
  /** "20–41° N, 150–125° W". */
  readonly region: string;
  /** "Grid A · 0.125° · 3 d". */
  readonly grid: string;
  /** Date of the map, "24 May 2032". */
  readonly date: string;
}

/** Edges of a pass band; null: that side is open. There are none where the filter is "none". */
export interface BandEdges {
  readonly shortestDays: number | null;
  readonly longestDays: number | null;
  readonly filter: string;
}

/** Axes of the record and what each date holds; latitudes and longitudes ascend. */
export interface RecordAxes {
  readonly latitude: Axis;
  readonly longitude: Axis;
  readonly time: TimeAxis;
  /** 1 where the date has at least one valid cell. */
  readonly hasData: Uint8Array;
  /** Share of ocean cells valid, by date. */
  readonly coverage: Float64Array;
  /** 1 for cells that ever hold a value; row-major latitude × longitude. */
  readonly ocean: Uint8Array;
  /** 1 on rows whose velocities come from a blend across the equator; drawn as a bracket. */
  readonly blendedRows?: Uint8Array;
}

/** Fields and profiles of one quantity, date and band. */
export interface LatitudesValues {
  readonly choice: { readonly inBand: boolean };
  readonly dateIndex: number;
  readonly map: Plane;
  readonly onDate: Float64Array;
  readonly profile: Pick<Profile, "mean" | "half95">;
  readonly latitudeTime: Plane;
  readonly columnDates: Int32Array;
  /** 1 where the filtered value rests on too little data, by date. */
  readonly filterEnd: Uint8Array;
  /** Colour limits of the map. */
  readonly limits: readonly [lower: number, upper: number];
  /** Colour limits of the latitude-time picture. */
  readonly pictureLimits: readonly [lower: number, upper: number];
  readonly response: Pick<BandResponse, "frequency" | "amplitude" | "daysLostEachEnd">;
  /** Standard errors of the map and of its zonal mean: hatched and banded where given. */
  readonly error?: Pick<FieldError, "map" | "onDate"> | null;
}

/** Room for a figure in CSS pixels. */
export interface FigureSize {
  readonly width: number;
  readonly height: number;
  /** Size of headings; ticks and notes are nine tenths of it. Left out: by the width. */
  readonly textSize?: number;
  /** "row": the three panels alone, without the period spectrum and the days with data. */
  readonly arrangement?: "full" | "row";
}

/** The edges that the period panel shows. */
export function shownBand({ band, heldBand }: LatitudesInput): BandEdges {
  return heldBand ?? band;
}

/** Whether values shown went through the study's band. */
export function isFiltered(input: LatitudesInput): boolean {
  return input.result.choice.inBand && input.band.filter !== "none";
}

const filterNames: Readonly<Record<string, string>> = {
  lanczos: "Lanczos filter",
  butterworth: "Butterworth filter",
  "running-mean": "running mean",
};

/** The band's filter in words: "Lanczos filter", "Butterworth filter of order 4". */
export function filterName({ filter, order }: LatitudesInput["band"]): string {
  const name = filterNames[filter] ?? "filter";
  return filter === "butterworth" && order !== undefined ? `${name} of order ${order}` : name;
}
