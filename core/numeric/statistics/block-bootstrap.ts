import { type RandomStream, randomStream } from "./random";

/**
 * Block length for moving blocks of an AR(1) series: the root of L = (N - L + 1)^((2/3)(1 - n'/n)), n'/n = (1 - r) / (1 + r);
 * not rounded, at least 1. Ref: Wilks 1997, J. Climate 10, 65-82 [from memory].
 */
export function blockLength(count: number, lagOne: number): number {
  const power = (2 / 3) * (1 - (1 - lagOne) / (1 + lagOne));
  if (!(power > 0)) return 1;
  let low = 1;
  let high = count;
  for (let i = 0; i < 200 && high - low > 1e-14 * high; i++) {
    const middle = (low + high) / 2;
    if (middle < (count - middle + 1) ** power) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}

/**
 * Indices of one resample of `count` samples: whole blocks of neighbours from random places, the last one cut. Use the same
 * indices at all points of a field to keep what links them. Ref: Künsch 1989, Ann. Stat. 17, 1217-1241 [from memory].
 */
export function blockIndices(count: number, block: number, random: RandomStream): Int32Array {
  const length = Math.max(1, Math.min(count, Math.round(block)));
  const indices = new Int32Array(count);
  for (let at = 0; at < count; at += length) {
    const start = random.below(count - length + 1);
    for (let k = 0; k < length && at + k < count; k++) indices[at + k] = start + k;
  }
  return indices;
}

export interface BootstrapSettings {
  readonly block: number;
  readonly resamples: number;
  readonly seed: number;
}

/**
 * A statistic of each resample `from` … `to` - 1 (all where not given). Resample i draws from stream i of the seed, so the
 * values do not depend on how the resamples are shared out.
 */
export function bootstrapStatistics(
  count: number,
  statistic: (indices: Int32Array) => number,
  settings: BootstrapSettings,
  from = 0,
  to = settings.resamples,
): Float64Array {
  return Float64Array.from({ length: to - from }, (_, i) =>
    statistic(blockIndices(count, settings.block, randomStream(settings.seed, from + i))),
  );
}

/** Percentile interval of values, NaN left out, by linear interpolation between order statistics; NaN without values. */
export function percentileInterval(
  values: Float64Array,
  level = 0.95,
): { readonly low: number; readonly high: number } {
  const sorted = values.filter((value) => !Number.isNaN(value)).sort();
  return { low: quantileOfSorted(sorted, (1 - level) / 2), high: quantileOfSorted(sorted, (1 + level) / 2) };
}

/** Quantile of values in rising order, linear between order statistics ((n - 1) p rule); NaN without values. */
export function quantileOfSorted(sorted: Float64Array, probability: number): number {
  const place = (sorted.length - 1) * probability;
  const below = Math.floor(place);
  if (!(below >= 0)) return Number.NaN;
  const above = Math.min(sorted.length - 1, below + 1);
  return sorted[below] + (place - below) * (sorted[above] - sorted[below]);
}
