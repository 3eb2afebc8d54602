import { chiSquaredQuantile } from "../distributions";

/**
 * Equivalent degrees of freedom of a spectrum averaged over tapers and over pieces that start at the samples given: 2 M²
 * over the sum of the squared inner products of all M shifted tapers with one another, for tapers of unit power and a
 * spectrum flat within the bandwidth. Whole, disjoint pieces with one taper give 2 a piece. The bins at zero and at the
 * Nyquist frequency have half as many. Ref: Welch 1967, IEEE Trans. AU-15, 70-73; Percival & Walden 1993, eq. 292b [from memory].
 */
export function equivalentDegrees(tapers: readonly Float64Array[], starts: readonly number[]): number {
  const length = tapers[0].length;
  const known = new Map<number, number>();
  let sum = 0;
  for (let i = 0; i < starts.length; i++) {
    for (let j = i; j < starts.length && starts[j] - starts[i] < length; j++) {
      const lag = starts[j] - starts[i];
      const shared = known.get(lag) ?? squaredProducts(tapers, lag);
      known.set(lag, shared);
      sum += i === j ? shared : 2 * shared;
    }
  }
  const estimates = tapers.length * starts.length;
  return sum > 0 ? (2 * estimates * estimates) / sum : 0;
}

function squaredProducts(tapers: readonly Float64Array[], lag: number): number {
  let sum = 0;
  for (const first of tapers) {
    for (const second of tapers) {
      let product = 0;
      for (let t = lag; t < first.length; t++) product += first[t] * second[t - lag];
      sum += product * product;
    }
  }
  return sum;
}

/**
 * Factors that turn a spectral estimate into the limits of its two-sided confidence interval: degrees / chi-squared at
 * (1 ± level) / 2. The same at every frequency, so that one bar serves on a logarithmic axis. NaN without degrees of freedom.
 */
export function spectrumInterval(degrees: number, level = 0.95): { readonly low: number; readonly high: number } {
  return {
    low: degrees / chiSquaredQuantile((1 + level) / 2, degrees),
    high: degrees / chiSquaredQuantile((1 - level) / 2, degrees),
  };
}
