import { fourierTransform, inverseFourierTransform } from "../fourier";
import type { RandomStream } from "./random";

/** Random phases in radians for the bins 1 … below n / 2 of a series of `count` samples; index 0 stands for bin 1. */
export function randomPhases(count: number, random: RandomStream): Float64Array {
  return Float64Array.from({ length: Math.ceil(count / 2) - 1 }, () => 2 * Math.PI * random.uniform());
}

/**
 * Surrogate of a gap-free series: the phases are added to those of its transform; mean, Nyquist bin and every amplitude stay,
 * so the periodogram does too. The same phases given to all points of a field keep their cross-spectra. NaN anywhere makes
 * all NaN. Ref: Theiler et al. 1992, Physica D 58, 77-94; Prichard & Theiler 1994, Phys. Rev. Lett. 73, 951-954 [from memory].
 */
export function phaseSurrogate(series: Float64Array, phases: Float64Array): Float64Array {
  const count = series.length;
  const { real, imaginary } = fourierTransform(series);
  for (let k = 1; k <= phases.length; k++) {
    const cosine = Math.cos(phases[k - 1]);
    const sine = Math.sin(phases[k - 1]);
    const a = real[k] * cosine - imaginary[k] * sine;
    const b = real[k] * sine + imaginary[k] * cosine;
    real[k] = a;
    imaginary[k] = b;
    real[count - k] = a;
    imaginary[count - k] = -b;
  }
  return inverseFourierTransform(real, imaginary).real;
}
