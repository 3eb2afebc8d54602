import type { SpectrumResult } from "../model/results";
import { type BackgroundBasis, removeBackground } from "../numeric/background";
import { bridgeGaps } from "../numeric/gaps";
import { welchSpectrum } from "../numeric/welch";

/** Longest segment in days: long enough for interannual periods, short enough that long records give several. */
const longestSegmentDays = 3000;
/** Gaps up to this many samples are bridged by straight lines before the transform. */
export const bridgedSamples = 5;

/**
 * Spectrum by period of a region: Welch spectra (Hann, half overlap, constant removed) of the sampled cells' anomalies,
 * averaged with each cell's weight (area). `samples[cell * dates + t]`. Cells with a gap longer than five samples leave out
 * the segments it falls in. NaN density where no segment of any cell is whole.
 */
export function regionSpectrum(
  quantity: { readonly id: string; readonly units: string },
  samples: ArrayLike<number> & { subarray(from: number, to: number): ArrayLike<number> },
  cellWeights: Float64Array,
  stepDays: number,
  basis: BackgroundBasis,
): SpectrumResult {
  const dates = basis.samples;
  const segment = Math.min(dates, Math.max(8, Math.floor(longestSegmentDays / stepDays)));
  let frequency: Float64Array = new Float64Array(0);
  let density: Float64Array = new Float64Array(0);
  let totalWeight = 0;
  let segments = 0;
  for (let cell = 0; cell < cellWeights.length; cell++) {
    const series = Float64Array.from(samples.subarray(cell * dates, (cell + 1) * dates));
    const { values } = bridgeGaps(removeBackground(series, basis), bridgedSamples);
    const spectrum = welchSpectrum(trimmed(values), stepDays, { segment, overlap: 0.5, detrend: "constant" });
    if (spectrum.segments === 0 || (density.length > 0 && spectrum.density.length !== density.length)) continue;
    if (density.length === 0) {
      frequency = spectrum.frequency;
      density = new Float64Array(spectrum.density.length);
    }
    for (let k = 0; k < density.length; k++) density[k] += cellWeights[cell] * spectrum.density[k];
    totalWeight += cellWeights[cell];
    segments = Math.max(segments, spectrum.segments);
  }
  return {
    quantity: quantity.id,
    frequency,
    density: density.map((value) => value / totalWeight),
    segments,
    segmentDays: frequency.length > 1 ? 1 / frequency[1] : segment * stepDays,
    window: "Hann, half overlap",
    units: quantity.units === "1" ? "day" : `(${quantity.units})2 day`,
  };
}

/** Without the missing samples at both ends. */
function trimmed(series: Float64Array): Float64Array {
  let from = 0;
  let to = series.length;
  while (from < to && Number.isNaN(series[from])) from++;
  while (to > from && Number.isNaN(series[to - 1])) to--;
  return series.subarray(from, to);
}
