import { type BackgroundBasis, removeBackground } from "../numeric/background";
import type { TimeFilter } from "./time-filter";

/**
 * Band-passed latitude–time matrix at the dates asked for, from zonal means `series[row * dates + t]`: background off, then
 * the filter along each latitude. For linear quantities this equals averaging band-passed maps, without gaps to rounding;
 * with gaps each latitude's zonal mean on a date counts as one sample whichever cells it rests on. Dates without data stay
 * NaN. `out[row * at.length + i]`.
 */
export function bandLatitudeTime(
  series: Float64Array,
  rows: number,
  filter: TimeFilter | null,
  basis: BackgroundBasis,
  hasData: Uint8Array,
  at: Int32Array,
): Float64Array {
  const dates = basis.samples;
  const out = new Float64Array(rows * at.length);
  for (let row = 0; row < rows; row++) {
    const anomaly = removeBackground(series.subarray(row * dates, (row + 1) * dates), basis);
    const filtered = filter ? filter.apply(anomaly, at) : Float64Array.from(at, (t) => anomaly[t]);
    for (let i = 0; i < at.length; i++) out[row * at.length + i] = hasData[at[i]] ? filtered[i] : Number.NaN;
  }
  return out;
}

/** At most `most` dates, evenly thinned from all; every date where they fit. */
export function thinnedDates(dates: number, most: number): Int32Array {
  const stride = Math.max(1, Math.ceil(dates / Math.max(1, most)));
  return Int32Array.from({ length: Math.ceil(dates / stride) }, (_, i) => i * stride);
}
