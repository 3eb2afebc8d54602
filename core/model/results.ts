/** A picture of latitude × something, row-major, latitudes ascending, NaN where missing. */
export interface Plane {
  readonly rows: number;
  readonly columns: number;
  readonly values: Float32Array;
}

/** Profile over latitude with its 95 % band; all arrays are as long as the latitude axis; NaN where too few cells. */
export interface Profile {
  readonly mean: Float64Array;
  /** Half width of the 95 % confidence interval of the mean. */
  readonly half95: Float64Array;
  readonly effectiveSize: Float64Array;
  /** Number of dates that entered. */
  readonly dates: Float64Array;
}

/** Response of the study's filter on the spectrum's frequency axis. */
export interface BandResponse {
  /** Cycles a day. */
  readonly frequency: Float64Array;
  readonly amplitude: Float64Array;
  /** Weights on each side of the centre. */
  readonly halfWidthSteps: number;
  readonly daysLostEachEnd: number;
}

/** Region-mean power spectrum by period (Welch). Density is one-sided, variance units per cycle a day. */
export interface SpectrumResult {
  readonly quantity: string;
  readonly frequency: Float64Array;
  readonly density: Float64Array;
  readonly segments: number;
  readonly segmentDays: number;
  readonly window: string;
  readonly units: string;
}
