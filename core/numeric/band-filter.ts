import { lanczosLowPass, symmetricResponse } from "./lanczos";

/**
 * A band-pass as the difference of two low-passes of equal length, each with weights that sum to 1. `slow` null: nothing is
 * taken off the long periods (low-pass); `fast` null: nothing off the short ones (high-pass, value minus slow).
 */
export interface BandFilter {
  readonly halfWidth: number;
  readonly fast: Float64Array | null;
  readonly slow: Float64Array | null;
}

/** Share of a low-pass's weight below which a filtered value is not given. */
export const leastWeightShare = 0.25;
/** Share of weight below which a filtered value is given but marked as a filter end. */
export const trustedWeightShare = 0.9;

/** Cut-offs in samples; null leaves that side open: only `shortestSamples` makes a low-pass, only `longestSamples` a high-pass. */
export interface CutOffs {
  readonly shortestSamples: number | null;
  readonly longestSamples: number | null;
}

/**
 * Lanczos low-, high- or band-pass. The half-width is the longest cut-off, or twice the shortest for a low-pass, so that
 * the window's first zero lies at or beyond that period; the rule n >= 1.3 / (f2 - f1) [Duchon 1979, from memory] is met for
 * every band whose edges differ by more than a factor of 2.3. Amplitude response is about one half at the cut-offs. Both
 * sides open: a filter of half-width 0 that changes nothing. Meaningful for cut-offs of at least two samples, in order.
 */
export function lanczosFilter({ shortestSamples, longestSamples }: CutOffs): BandFilter {
  if (shortestSamples === null && longestSamples === null) return { halfWidth: 0, fast: null, slow: null };
  const halfWidth = Math.max(2, Math.ceil(longestSamples ?? 2 * (shortestSamples ?? 1)));
  return {
    halfWidth,
    fast: shortestSamples === null ? null : lanczosLowPass(1 / shortestSamples, halfWidth),
    slow: longestSamples === null ? null : lanczosLowPass(1 / longestSamples, halfWidth),
  };
}

/** Lanczos band-pass for periods between two cut-offs, in samples; Infinity for `longest` makes a low-pass. */
export function lanczosBand(shortestSamples: number, longestSamples: number): BandFilter {
  return lanczosFilter({ shortestSamples, longestSamples: Number.isFinite(longestSamples) ? longestSamples : null });
}

/** Amplitude response at a frequency in cycles a sample. */
export function bandResponse(filter: BandFilter, frequencyPerSample: number): number {
  const fast = filter.fast ? symmetricResponse(filter.fast, frequencyPerSample) : 1;
  return fast - (filter.slow ? symmetricResponse(filter.slow, frequencyPerSample) : 0);
}

/**
 * Share of each low-pass's weight that lies on samples with data, the smaller of the two, by sample. 1 well inside a
 * gap-free record, about one half at its ends; may exceed 1 where missing samples lie under negative weights.
 */
export function weightShare(filter: BandFilter, hasData: Uint8Array): Float64Array {
  return Float64Array.from(hasData, (_, t) =>
    Math.min(shareAt(filter.fast, filter.halfWidth, hasData, t), shareAt(filter.slow, filter.halfWidth, hasData, t)),
  );
}

function shareAt(weights: Float64Array | null, halfWidth: number, hasData: Uint8Array, t: number): number {
  if (!weights) return 1;
  let share = 0;
  const from = Math.max(0, t - halfWidth);
  const to = Math.min(hasData.length - 1, t + halfWidth);
  for (let s = from; s <= to; s++) if (hasData[s]) share += weights[s - t + halfWidth];
  return share;
}

/**
 * Applies the filter to one series at the samples asked for. Gap-aware: each low-pass is a weighted mean over the valid
 * samples, so a constant stays constant; NaN samples are left out and never spread beyond the half-width. NaN where less
 * than a quarter of either low-pass's weight lies on data. Samples outside the series count as missing.
 */
export function filterSeries(series: Float64Array, filter: BandFilter, at?: Int32Array): Float64Array {
  const count = at ? at.length : series.length;
  const out = new Float64Array(count);
  const { halfWidth } = filter;
  const missing = missingBefore(series);
  // Where the whole window is known both low-passes are plain sums, and one pass with their difference does.
  const both = differenceOfWeights(filter);
  for (let i = 0; i < count; i++) {
    const t = at ? at[i] : i;
    const from = t - halfWidth;
    if (from >= 0 && t + halfWidth < series.length && missing[t + halfWidth + 1] === missing[from]) {
      let sum = 0;
      for (let k = 0; k < both.length; k++) sum += both[k] * series[from + k];
      out[i] = sum;
      continue;
    }
    const fast = filter.fast ? weightedMean(series, filter.fast, filter.halfWidth, t) : series[t];
    const slow = filter.slow ? weightedMean(series, filter.slow, filter.halfWidth, t) : 0;
    out[i] = fast - slow;
  }
  return out;
}

/** Number of missing samples before each index. */
function missingBefore(series: Float64Array): Int32Array {
  const before = new Int32Array(series.length + 1);
  for (let i = 0; i < series.length; i++) before[i + 1] = before[i] + (Number.isNaN(series[i]) ? 1 : 0);
  return before;
}

/** Fast less slow weights; an open short side passes the sample itself. */
function differenceOfWeights({ halfWidth, fast, slow }: BandFilter): Float64Array {
  const both = fast ? fast.slice() : new Float64Array(2 * halfWidth + 1);
  if (!fast) both[halfWidth] = 1;
  if (slow) for (let k = 0; k < both.length; k++) both[k] -= slow[k];
  return both;
}

function weightedMean(series: Float64Array, weights: Float64Array, halfWidth: number, t: number): number {
  const from = Math.max(0, t - halfWidth);
  const to = Math.min(series.length - 1, t + halfWidth);
  let sum = 0;
  let share = 0;
  for (let s = from; s <= to; s++) {
    const value = series[s];
    if (!Number.isNaN(value)) {
      const weight = weights[s - t + halfWidth];
      sum += weight * value;
      share += weight;
    }
  }
  return share < leastWeightShare ? Number.NaN : sum / share;
}
