import { compensatedSum } from "./statistics/compensated-sum";

/**
 * Mean and standard deviation (n - 1) of the valid samples; NaN where too few. Compensated sums in two passes, the second one
 * corrected for the rounding of the mean, so that a small spread on a large mean keeps its digits.
 * Ref: Chan, Golub & LeVeque 1983, Am. Stat. 37, 242-247 (corrected two-pass).
 */
export function meanAndDeviation(series: Float64Array): { mean: number; deviation: number; count: number } {
  const valid = series.filter((value) => !Number.isNaN(value));
  const count = valid.length;
  const mean = count > 0 ? compensatedSum(valid) / count : Number.NaN;
  const apart = valid.map((value) => value - mean);
  const left = compensatedSum(apart);
  const squares = compensatedSum(apart.map((value) => value * value)) - (left * left) / count;
  return { mean, deviation: count > 1 ? Math.sqrt(squares / (count - 1)) : Number.NaN, count };
}

/**
 * Autocorrelation at lags 0 … longestLag about the mean. Gap-free series get the biased estimate (divided by the whole sum of
 * squares, which keeps |r| <= 1); with gaps the mean product over pairs of valid samples stands in, scaled alike. 0 where a
 * lag has no pair.
 */
export function autocorrelation(series: Float64Array, longestLag: number): Float64Array {
  const { mean } = meanAndDeviation(series);
  const length = series.length;
  const out = new Float64Array(longestLag + 1);
  for (let lag = 0; lag <= longestLag; lag++) {
    let sum = 0;
    let pairs = 0;
    for (let t = 0; t + lag < length; t++) {
      const product = (series[t] - mean) * (series[t + lag] - mean);
      if (Number.isNaN(product)) continue;
      sum += product;
      pairs++;
    }
    out[lag] = pairs > 0 ? ((sum / pairs) * (length - lag)) / length : 0;
  }
  const variance = out[0];
  return out.map((value) => value / variance);
}

/** Effective sample size of the mean of an AR(1) series: N (1 - r) / (1 + r), within 1 … N. Ref: Leith 1973, J. Appl. Meteor. 12, 1066-1069 [from memory]. */
export function effectiveSizeOfMean(count: number, lagOne: number): number {
  return Math.min(count, Math.max(1, (count * (1 - lagOne)) / (1 + lagOne)));
}

/**
 * Effective sample size from the products of two series' autocorrelations: N / sum over all lags of r1 r2 (1 - |k|/N), for
 * band-passed series that AR(1) does not describe. Both start at lag 0. Ref: Bretherton et al. 1999, J. Climate 12, 1990-2009.
 */
export function effectiveSizeFromLags(count: number, first: Float64Array, second: Float64Array): number {
  let sum = first[0] * second[0];
  for (let k = 1; k < Math.min(first.length, second.length, count); k++) {
    sum += 2 * first[k] * second[k] * (1 - k / count);
  }
  return Math.min(count, Math.max(1, count / sum));
}
