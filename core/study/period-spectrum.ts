import type { SpectrumResult } from "../model/results";
import { type BackgroundBasis, removeBackground } from "../numeric/background";
import { bridgeGaps } from "../numeric/gaps";
import { detrended } from "../numeric/spectra/detrend";
import { lombScargle } from "../numeric/spectra/lomb-scargle";
import { type Taper, taperName } from "../numeric/spectra/tapers";
import { welchSpectrum } from "../numeric/welch";
import type { SpectrumSettings } from "./schema";

/** Gaps up to this many samples are bridged by straight lines before the transform. */
export const bridgedSamples = 5;
/** No segment is shorter. */
const fewestSamples = 8;

interface Described {
  readonly id: string;
  readonly units: string;
}

/** `samples[cell * dates + t]`. */
type Samples = ArrayLike<number> & { subarray(from: number, to: number): ArrayLike<number> };

const usual: SpectrumSettings = { taper: "hann", overlap: 0.5, detrend: "constant", longestSegmentDays: 3000 };

/**
 * Spectrum by period of a region: Welch spectra (Hann and half overlap unless told otherwise) of the sampled cells' anomalies, averaged with the cells' weights. Cells with
 * a gap longer than five samples leave out the segments it falls in; no segment is longer than the longest stretch without
 * such a gap. No frequencies at all where every stretch is shorter than eight samples.
 */
export function regionSpectrum(
  quantity: Described,
  samples: Samples,
  cellWeights: Float64Array,
  stepDays: number,
  basis: BackgroundBasis,
  settings: SpectrumSettings = usual,
): SpectrumResult {
  const dates = basis.samples;
  const taper = taperOf(settings.taper);
  const anomalies = Array.from(cellWeights, (_, cell) => {
    const series = Float64Array.from(samples.subarray(cell * dates, (cell + 1) * dates));
    return bridgeGaps(removeBackground(series, basis), bridgedSamples).values;
  });
  const whole = anomalies.reduce((most, values) => Math.max(most, longestStretch(values)), 0);
  const segment = Math.min(whole, Math.max(fewestSamples, Math.floor(settings.longestSegmentDays / stepDays)));
  const mean = new WeightedMean();
  let segments = 0;
  for (const [cell, values] of (segment < fewestSamples ? [] : anomalies).entries()) {
    const { overlap, detrend } = settings;
    const spectrum = welchSpectrum(trimmed(values), stepDays, { segment, overlap, detrend, taper });
    if (spectrum.segments === 0) continue;
    if (mean.add(spectrum.frequency, spectrum.density, cellWeights[cell]))
      segments = Math.max(segments, spectrum.segments);
  }
  const window = `${taperName(taper)}, overlap ${Math.round(100 * settings.overlap)} %`;
  return {
    ...mean.result(),
    quantity: quantity.id,
    segments,
    segmentDays: segment * stepDays,
    window,
    units: unitsOf(quantity),
  };
}

/**
 * The same for dates at uneven steps: Lomb-Scargle periodograms of the cells' anomalies at the frequencies of as many even
 * dates over the same time, each scaled so that its sum times the frequency spacing is the variance: on uneven dates the
 * frequencies overlap, and the periodogram alone would add up to more.
 */
export function unevenRegionSpectrum(
  quantity: Described,
  samples: Samples,
  cellWeights: Float64Array,
  days: Float64Array,
  basis: BackgroundBasis,
  settings: Pick<SpectrumSettings, "detrend"> = usual,
): SpectrumResult {
  const dates = days.length;
  const span = ((days[dates - 1] - days[0]) * dates) / (dates - 1);
  const frequency = Float64Array.from({ length: Math.floor(dates / 2) }, (_, k) => (k + 1) / span);
  const mean = new WeightedMean();
  for (let cell = 0; cell < cellWeights.length; cell++) {
    const anomaly = removeBackground(Float64Array.from(samples.subarray(cell * dates, (cell + 1) * dates)), basis);
    const known = Array.from(anomaly.keys()).filter((t) => !Number.isNaN(anomaly[t]));
    if (known.length < dates / 2) continue;
    const times = Float64Array.from(known, (t) => days[t]);
    const values = detrended(
      Float64Array.from(known, (t) => anomaly[t]),
      settings.detrend,
    );
    const { power } = lombScargle(times, values, frequency);
    const variance = values.reduce((sum, value) => sum + value * value, 0) / values.length;
    const total = power.reduce((sum, value) => sum + value, 0) / span;
    const density = power.map((value) => (value * variance) / total);
    mean.add(frequency, density, cellWeights[cell]);
  }
  return {
    ...mean.result(),
    quantity: quantity.id,
    segments: 1,
    segmentDays: span,
    window: "Lomb-Scargle, no taper",
    units: unitsOf(quantity),
  };
}

/** Mean of spectra on one frequency axis, weighted; others are passed over. */
class WeightedMean {
  #frequency: Float64Array = new Float64Array(0);
  #sum: Float64Array = new Float64Array(0);
  #weight = 0;

  add(frequency: Float64Array, density: Float64Array, weight: number): boolean {
    if (this.#sum.length === 0) {
      this.#frequency = frequency;
      this.#sum = new Float64Array(density.length);
    }
    if (density.length !== this.#sum.length) return false;
    for (let k = 0; k < density.length; k++) this.#sum[k] += weight * density[k];
    this.#weight += weight;
    return true;
  }

  result(): { frequency: Float64Array; density: Float64Array } {
    return { frequency: this.#frequency, density: this.#sum.map((value) => value / this.#weight) };
  }
}

function taperOf(kind: SpectrumSettings["taper"]): Taper {
  if (kind === "cosine") return { kind, share: 0.2 };
  return kind === "multitaper" ? { kind: "sine", count: 4 } : { kind };
}

function unitsOf({ units }: Described): string {
  return units === "1" ? "day" : `(${units})2 day`;
}

/** Most samples in a row that are there. */
function longestStretch(series: Float64Array): number {
  let longest = 0;
  let run = 0;
  for (const value of series) {
    run = Number.isNaN(value) ? 0 : run + 1;
    longest = Math.max(longest, run);
  }
  return longest;
}

/** Without the missing samples at both ends. */
function trimmed(series: Float64Array): Float64Array {
  let from = 0;
  let to = series.length;
  while (from < to && Number.isNaN(series[from])) from++;
  while (to > from && Number.isNaN(series[to - 1])) to--;
  return series.subarray(from, to);
}
