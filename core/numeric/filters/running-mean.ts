import { leastWeightShare } from "../band-filter";

/** A filtered series and, by sample, the share of the filter's weight that lay on data. */
export interface WeighedSeries {
  readonly values: Float64Array;
  readonly share: Float64Array;
}

/**
 * Centred weights of a mean over `points` samples, sum 1. Odd: equal weights. Even: one sample more, with half a weight at
 * each end, so that the mean is not half a sample off its date.
 */
export function runningMeanWeights(points: number): Float64Array {
  const halfWidth = Math.floor(points / 2);
  const weights = new Float64Array(2 * halfWidth + 1).fill(1 / points);
  if (points % 2 === 0) {
    weights[0] /= 2;
    weights[2 * halfWidth] /= 2;
  }
  return weights;
}

/**
 * Amplitude response of a plain mean over `points` samples, at a frequency in cycles a sample: sin(pi F n)/(n sin(pi F)).
 * For an even count such a mean belongs to the middle between two samples.
 */
export function plainMeanResponse(points: number, frequencyPerSample: number): number {
  const bottom = points * Math.sin(Math.PI * frequencyPerSample);
  return bottom === 0 ? 1 : Math.sin(Math.PI * frequencyPerSample * points) / bottom;
}

/** Amplitude response of the centred weights: the plain mean's, for even counts times cos(pi F) (two of them averaged). */
export function runningMeanResponse(points: number, frequencyPerSample: number): number {
  const plain = plainMeanResponse(points, frequencyPerSample);
  return points % 2 === 0 ? plain * Math.cos(Math.PI * frequencyPerSample) : plain;
}

/**
 * Centred running mean. Where a sample is missing (NaN, or beyond the ends) the one opposite is left out too, so that a
 * constant and a straight line are kept everywhere a value is given. NaN where less than a quarter of the weight is left; one
 * missing sample changes nothing beyond the half-width.
 */
export function runningMean(series: Float64Array, points: number): WeighedSeries {
  const weights = runningMeanWeights(points);
  const halfWidth = (weights.length - 1) / 2;
  const values = new Float64Array(series.length);
  const share = new Float64Array(series.length);
  for (let t = 0; t < series.length; t++) {
    const known = !Number.isNaN(series[t]);
    let sum = known ? weights[halfWidth] * series[t] : 0;
    let weight = known ? weights[halfWidth] : 0;
    const reach = Math.min(halfWidth, t, series.length - 1 - t);
    for (let k = 1; k <= reach; k++) {
      const pair = series[t - k] + series[t + k];
      if (Number.isNaN(pair)) continue;
      sum += weights[halfWidth + k] * pair;
      weight += 2 * weights[halfWidth + k];
    }
    share[t] = weight;
    values[t] = weight < leastWeightShare ? Number.NaN : sum / weight;
  }
  return { values, share };
}
