import { equivalentDegrees } from "./spectra/confidence";
import { oneSidedAxis, oneSidedDensity, type Scaling } from "./spectra/density";
import { type Detrend, detrended } from "./spectra/detrend";
import { type Taper, taperFamily } from "./spectra/tapers";

export { detrended } from "./spectra/detrend";
export { hannWindow } from "./spectra/tapers";

export interface WelchSettings {
  /** Samples a segment. */
  readonly segment: number;
  readonly overlap: number;
  readonly detrend: Detrend;
  /** Periodic Hann where none is given. */
  readonly taper?: Taper;
  /** "power" where none is given. */
  readonly scaling?: Scaling;
}

export interface PowerSpectrum {
  /** Cycles a unit of `step`. */
  readonly frequency: Float64Array;
  /** One-sided density: its sum times the frequency spacing is the variance. Units² per cycle a unit of step. */
  readonly density: Float64Array;
  /** Segments that entered; those with a NaN are left out. Density is NaN where none did. */
  readonly segments: number;
  /** Equivalent degrees of freedom of one estimate (half as many at zero and at the Nyquist frequency); 0 without segments. */
  readonly degreesOfFreedom: number;
}

/**
 * Welch's averaged periodogram, normalised by the taper's power so that the density integrates to the variance. `step` is
 * the sampling interval; a segment longer than the series is cut to it. Limits: `spectrumInterval(degreesOfFreedom)`.
 * Ref: Welch 1967, IEEE Trans. AU-15, 70-73.
 */
export function welchSpectrum(series: Float64Array, step: number, settings: WelchSettings): PowerSpectrum {
  const length = Math.min(settings.segment, series.length);
  const hop = Math.max(1, length - Math.floor(length * settings.overlap));
  const tapers = taperFamily(settings.taper ?? { kind: "hann" }, length);
  const frequency = oneSidedAxis(length, step);
  const density = new Float64Array(frequency.length);
  const starts: number[] = [];
  for (let start = 0; start + length <= series.length; start += hop) {
    const piece = detrended(series.subarray(start, start + length), settings.detrend);
    if (piece.some(Number.isNaN)) continue;
    starts.push(start);
    const part = oneSidedDensity(piece, tapers, step, settings.scaling);
    for (let k = 0; k < density.length; k++) density[k] += part[k];
  }
  return {
    frequency,
    density: density.map((value) => value / starts.length),
    segments: starts.length,
    degreesOfFreedom: equivalentDegrees(tapers, starts),
  };
}
