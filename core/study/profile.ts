import type { Profile } from "../model/results";
import { studentQuantile } from "../numeric/distributions";
import {
  autocorrelation,
  effectiveSizeFromLags,
  effectiveSizeOfMean,
  meanAndDeviation,
} from "../numeric/serial-correlation";

/** Fewest effective samples for which an interval is given. */
const leastEffectiveSize = 2;

/**
 * Mean over time of each latitude's series with its 95 % confidence half-width, Student's t over the effective sample size:
 * AR(1) for series as they stand, products of autocorrelations for band-passed ones (`inBand`), which AR(1) does not describe.
 * `series[row * dates + t]`, NaN for gaps; a row with fewer than 3 valid dates is NaN, and so is the interval of one with fewer
 * than 2 effective samples, where Student's t would stretch without bound.
 */
export function meanProfile(series: Float64Array, rows: number, dates: number, inBand: boolean): Profile {
  const profile = {
    mean: new Float64Array(rows),
    half95: new Float64Array(rows),
    effectiveSize: new Float64Array(rows),
    dates: new Float64Array(rows),
  };
  for (let row = 0; row < rows; row++) {
    const own = series.subarray(row * dates, (row + 1) * dates);
    const { mean, deviation, count } = meanAndDeviation(own);
    const size = count < 3 ? Number.NaN : effectiveSize(own, count, inBand);
    profile.mean[row] = mean;
    profile.effectiveSize[row] = size;
    profile.dates[row] = count;
    profile.half95[row] =
      size >= leastEffectiveSize ? (studentQuantile(0.975, size - 1) * deviation) / Math.sqrt(size) : Number.NaN;
  }
  return profile;
}

function effectiveSize(series: Float64Array, count: number, inBand: boolean): number {
  if (!inBand) return effectiveSizeOfMean(count, autocorrelation(series, 1)[1]);
  const lags = autocorrelation(series, Math.floor(series.length / 2));
  return effectiveSizeFromLags(count, lags, lags);
}
