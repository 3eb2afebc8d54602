/**
 * A filter along time as the steps of a study use it: on a series, and as the weights that one date's value takes from the
 * record, so that a map can be one weighted sum. Gaps of up to a set length are bridged, longer ones split the record, and no
 * filter reaches across them.
 */
export interface TimeFilter {
  /** Samples from which the value inside a long record is drawn, on each side. */
  readonly reach: number;
  /** Amplitude response at a frequency in cycles a sample. */
  readonly response: (frequencyPerSample: number) => number;
  /** Filtered values at the samples asked for, all where left out. NaN in long gaps and in pieces too short for the filter. */
  readonly apply: (series: Float64Array, at?: Int32Array) => Float64Array;
  /**
   * Weight of every date in the value at `date` for series known where `known` is 1; null where there is no value. Its
   * product with such a series equals `apply` there.
   */
  readonly row: (known: Uint8Array, date: number) => Float64Array | null;
  /** Samples of padding at each end of a piece; 0 for filters that use none. */
  readonly padding: number;
  /** Share of the filter's weight that lies on dates with data; 0 where there is no value. About 1 inside, a half at an end. */
  readonly share: (known: Uint8Array) => Float64Array;
  /** 1 on dates whose value rests on too little of the filter's weight, on padding, or is not there. */
  readonly ends: (known: Uint8Array) => Uint8Array;
}
