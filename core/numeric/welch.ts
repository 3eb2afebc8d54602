import { fourierTransform } from "./fourier";

export interface WelchSettings {
  /** Samples a segment. */
  readonly segment: number;
  readonly overlap: number;
  readonly detrend: "none" | "constant" | "linear";
}

export interface PowerSpectrum {
  /** Cycles a unit of `step`. */
  readonly frequency: Float64Array;
  /** One-sided density: its sum times the frequency spacing is the variance. Units² per cycle a unit of step. */
  readonly density: Float64Array;
  /** Segments that entered; those with a NaN are left out. Density is NaN where none did. */
  readonly segments: number;
}

/** Periodic Hann window. */
export function hannWindow(length: number): Float64Array {
  return Float64Array.from({ length }, (_, i) => 0.5 - 0.5 * Math.cos((2 * Math.PI * i) / length));
}

/**
 * Welch's averaged periodogram with a periodic Hann window, normalised by the window's power so that the density integrates
 * to the variance. `step` is the sampling interval. Ref: Welch 1967, IEEE Trans. AU-15, 70-73.
 */
export function welchSpectrum(series: Float64Array, step: number, settings: WelchSettings): PowerSpectrum {
  const length = Math.min(settings.segment, series.length);
  const hop = Math.max(1, length - Math.floor(length * settings.overlap));
  const window = hannWindow(length);
  let power = 0;
  for (const weight of window) power += weight * weight;
  const bins = Math.floor(length / 2) + 1;
  const density = new Float64Array(bins);
  let segments = 0;
  for (let start = 0; start + length <= series.length; start += hop) {
    const piece = detrended(series.subarray(start, start + length), settings.detrend);
    if (piece.some(Number.isNaN)) continue;
    segments++;
    const { real, imaginary } = fourierTransform(piece.map((value, i) => value * window[i]));
    for (let k = 0; k < bins; k++) density[k] += real[k] * real[k] + imaginary[k] * imaginary[k];
  }
  for (let k = 0; k < bins; k++) {
    const isOneOfAKind = k === 0 || (length % 2 === 0 && k === bins - 1);
    density[k] *= ((isOneOfAKind ? 1 : 2) * step) / (power * segments);
  }
  return {
    frequency: Float64Array.from({ length: bins }, (_, k) => k / (length * step)),
    density,
    segments,
  };
}

/** A copy with its mean or its least-squares line taken off. NaN anywhere makes all NaN (but for "none"). */
export function detrended(series: Float64Array, how: WelchSettings["detrend"]): Float64Array {
  if (how === "none") return series.slice();
  const count = series.length;
  let mean = 0;
  for (const value of series) mean += value;
  mean /= count;
  if (how === "constant") return series.map((value) => value - mean);
  const middle = (count - 1) / 2;
  let slope = 0;
  let scale = 0;
  for (let i = 0; i < count; i++) {
    slope += (i - middle) * (series[i] - mean);
    scale += (i - middle) * (i - middle);
  }
  slope = scale > 0 ? slope / scale : 0;
  return series.map((value, i) => value - mean - slope * (i - middle));
}
