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
 * Spectrum by period of a region: Welch spectra (Hann and half overlap unless told otherwise) of the sampled cells'
 * anomalies, averaged with the cells' weights and numbers of segments. A gap longer than five samples cuts a cell's series
 * into stretches; no segment is longer than the longest stretch. No frequencies at all where every stretch is shorter than eight samples.
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
  const whole = anomalies.flatMap(stretches).reduce((most, { length }) => Math.max(most, length), 0);
  const segment = Math.min(whole, Math.max(fewestSamples, Math.floor(settings.longestSegmentDays / stepDays)));
  const mean = new WeightedMean();
  let segments = 0;
  for (const [cell, values] of (segment < fewestSamples ? [] : anomalies).entries()) {
    const { overlap, detrend } = settings;
    let own = 0;
    for (const stretch of stretches(values).filter(({ length }) => length >= segment)) {
      const spectrum = welchSpectrum(stretch, stepDays, { segment, overlap, detrend, taper });
      mean.add(spectrum.frequency, spectrum.density, cellWeights[cell] * spectrum.segments);
      own += spectrum.segments;
    }
    segments = Math.max(segments, own);
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

/** The runs of samples that are there. */
function stretches(series: Float64Array): Float64Array[] {
  const found: Float64Array[] = [];
  let from = 0;
  for (let i = 0; i <= series.length; i++) {
    if (i < series.length && !Number.isNaN(series[i])) continue;
    if (i > from) found.push(series.subarray(from, i));
    from = i + 1;
  }
  return found;
}
