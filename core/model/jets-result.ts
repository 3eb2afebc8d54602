/** A slope with the ends of its 95 % confidence interval. */
export interface RateNumbers {
  readonly value: number;
  readonly low95: number;
  readonly high95: number;
}

/** One jet of the record: a followed line of extremes of the zonal-mean flow. Latitudes in degrees north, speeds eastward in m s-1. */
export interface JetRow {
  readonly id: number;
  readonly sign: 1 | -1;
  readonly meanLatitude: number;
  readonly southernmost: number;
  readonly northernmost: number;
  readonly meanSpeed: number;
  readonly peakSpeed: number;
  readonly meanWidthKm: number;
  /** Mean share of longitude sectors in which it shows; NaN where none were looked at. */
  readonly zonalExtent: number;
  /** Kilometres north a kilometre east. */
  readonly tilt: number;
  readonly firstDay: number;
  readonly lastDay: number;
  readonly lifetimeDays: number;
  readonly datesFound: number;
  /** Of the dates with data during its life. */
  readonly shareOfDaysPresent: number;
  /** Of all dates with data: what the eddy test weighs. */
  readonly shareOfRecord: number;
  readonly driftDegreesPerYear: RateNumbers;
  readonly driftMetresPerSecond: RateNumbers;
  readonly eFoldingDays: number;
  readonly integralDays: number;
  readonly effectiveSize: number;
  /** "record start", "birth", "split from 3"; "record end", "end", "merger into 4". */
  readonly beginning: string;
  readonly ending: string;
  /** The line itself: indices into the record's dates, and latitudes there. */
  readonly dates: Int32Array;
  readonly latitudes: Float64Array;
}

export interface JetsResult {
  /** Names record and settings the jets belong to: an eddy test with another key is stale. */
  readonly key: string;
  /** Jets that live as long as the study asks, from south to north. */
  readonly jets: readonly JetRow[];
  /** Shorter-lived lines that were left out. */
  readonly shorterLines: number;
  /** Least prominence used, m s-1. */
  readonly prominence: number;
  /** Mean distance between neighbouring extremes of one direction on a date, km; NaN for too few. */
  readonly spacingKm: number;
  readonly persistence: { readonly share: Float64Array; readonly longestDays: Float64Array };
  /** By latitude: chance that red noise has as much variance in the band, and a mean as far from zero. */
  readonly redNoise: { readonly bandP: Float64Array; readonly meanP: Float64Array };
  /** Latitudes that stay significant at 5 % after false-discovery control, 1 or 0. */
  readonly redNoiseHeld: { readonly band: Uint8Array; readonly mean: Uint8Array };
}

export interface JetVerdictRow {
  readonly jet: number;
  readonly score: number;
  readonly oceansAsStrong: number;
  readonly oceans: number;
  readonly p: number;
  readonly adjustedP: number;
  /** No stronger jet of its direction stands in its neighbourhood: only such jets count as tests. */
  readonly leads: boolean;
  readonly verdict: "held" | "not told apart from eddies";
}

export interface EddyTestResult {
  /** The key of the jets that were tested. */
  readonly key: string;
  readonly seed: number;
  readonly oceans: number;
  readonly level: number;
  readonly verdicts: readonly JetVerdictRow[];
  /** A jet's neighbourhood reaches this far to either side, degrees. */
  readonly halfSpacingDegrees: number;
  /** The eddies drawn, and how each number was found. */
  readonly population: {
    readonly medianAmplitudeMetres: number;
    readonly medianRadiusMetres: number;
    readonly densityPerMillionKm2: number;
    readonly lifetimeDays: number;
    /** At the middle latitude, eastward. */
    readonly speedMetresPerSecond: number;
    readonly shareHigh: number;
    readonly notes: Readonly<Record<string, string>>;
  };
}
