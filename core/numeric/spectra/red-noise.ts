import { chiSquaredQuantile } from "../distributions";

/**
 * Lag-one coefficient of the red noise that stands against a series: (r1 + sqrt r2) / 2, from its autocorrelations at lags
 * one and two; r1 alone where r2 is not positive. Ref: Torrence & Compo 1998, BAMS 79, 61-78 [from memory].
 */
export function redNoiseCoefficient(lagOne: number, lagTwo: number): number {
  return lagTwo > 0 ? (lagOne + Math.sqrt(lagTwo)) / 2 : lagOne;
}

/**
 * Spectrum of AR(1) noise by frequency in cycles a sample (0 … 1/2), scaled to a mean of 1 over all frequencies: (1 - r²) /
 * (1 + r² - 2 r cos 2 pi f). Ref: Gilman et al. 1963, J. Atmos. Sci. 20, 182-184; Torrence & Compo 1998, eq. 16 [from memory].
 */
export function redNoiseSpectrum(coefficient: number, frequencyPerSample: Float64Array): Float64Array {
  const r = coefficient;
  return frequencyPerSample.map((f) => (1 - r * r) / (1 + r * r - 2 * r * Math.cos(2 * Math.PI * f)));
}

/**
 * One-sided density of AR(1) noise of the variance given, at frequencies in cycles a unit of `step`; units² times that unit.
 * Its integral over 0 … 1 / (2 step) is the variance.
 */
export function redNoiseDensity(
  coefficient: number,
  variance: number,
  frequency: Float64Array,
  step: number,
): Float64Array {
  const shape = redNoiseSpectrum(
    coefficient,
    frequency.map((f) => f * step),
  );
  return shape.map((value) => 2 * step * variance * value);
}

/**
 * Factor over the red-noise density that an estimate with the degrees of freedom given passes by chance with probability
 * `risk`: chi-squared at 1 - risk / bins, over the degrees. `bins` counts the frequencies that are searched for a peak; 1 is
 * right only for a frequency chosen beforehand (Bonferroni's rule). Two degrees: 2.9957 at 5 %, 4.6052 at 1 %.
 */
export function redNoiseThreshold(degrees: number, risk = 0.05, bins = 1): number {
  return chiSquaredQuantile(1 - risk / bins, degrees) / degrees;
}
