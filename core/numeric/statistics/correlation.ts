import { normalQuantile, studentQuantile, studentTwoSided } from "../distributions";
import { autocorrelation } from "../serial-correlation";
import { effectiveSizeOverValid } from "./effective-size";

/**
 * Pearson's correlation over the samples valid in both series, within -1 … 1, and how many there are. NaN under three samples
 * or where a series does not vary.
 */
export function pearsonCorrelation(
  first: ArrayLike<number>,
  second: ArrayLike<number>,
): { readonly correlation: number; readonly count: number } {
  let count = 0;
  let [firstMean, secondMean] = [0, 0];
  for (let t = 0; t < first.length; t++) {
    if (Number.isNaN(first[t] + second[t])) continue;
    count++;
    firstMean += first[t];
    secondMean += second[t];
  }
  firstMean /= count;
  secondMean /= count;
  let [products, firstSquares, secondSquares] = [0, 0, 0];
  for (let t = 0; t < first.length; t++) {
    const a = first[t] - firstMean;
    const b = second[t] - secondMean;
    if (Number.isNaN(a + b)) continue;
    products += a * b;
    firstSquares += a * a;
    secondSquares += b * b;
  }
  const scale = Math.sqrt(firstSquares) * Math.sqrt(secondSquares);
  const correlation = count >= 3 && scale > 0 ? Math.max(-1, Math.min(1, products / scale)) : Number.NaN;
  return { correlation, count };
}

/** Two-sided p value of a correlation under none, by Student's t with N_eff - 2 degrees of freedom; NaN for N_eff <= 2. */
export function correlationPValue(correlation: number, effectiveSize: number): number {
  const degrees = effectiveSize - 2;
  if (!(degrees > 0) || Number.isNaN(correlation)) return Number.NaN;
  const rest = 1 - correlation * correlation;
  return rest > 0 ? studentTwoSided(correlation * Math.sqrt(degrees / rest), degrees) : 0;
}

/**
 * Confidence limits of a correlation by Fisher's z, whose deviation is 1 / sqrt(N_eff - 3); -1 and 1 where N_eff <= 3 leaves
 * nothing to say. Ref: Fisher 1921, Metron 1, 3-32 [from memory].
 */
export function correlationInterval(
  correlation: number,
  effectiveSize: number,
  level = 0.95,
): { readonly low: number; readonly high: number } {
  if (Number.isNaN(correlation)) return { low: Number.NaN, high: Number.NaN };
  if (!(effectiveSize > 3)) return { low: -1, high: 1 };
  const half = normalQuantile((1 + level) / 2) / Math.sqrt(effectiveSize - 3);
  const z = Math.atanh(correlation);
  return { low: Math.tanh(z - half), high: Math.tanh(z + half) };
}

/** The least |correlation| that differs from none at the two-sided risk given; NaN for N_eff <= 2. */
export function criticalCorrelation(effectiveSize: number, risk = 0.05): number {
  const degrees = effectiveSize - 2;
  const t = studentQuantile(1 - risk / 2, degrees);
  return t / Math.sqrt(degrees + t * t);
}

export interface TestedCorrelation {
  readonly correlation: number;
  /** Samples valid in both series. */
  readonly count: number;
  readonly effectiveSize: number;
  readonly pValue: number;
  readonly low: number;
  readonly high: number;
}

/**
 * Correlation of two series on one even axis, tested with the effective size from the products of their own autocorrelations
 * up to `longestLag` (a quarter of the record where not given), over the samples valid in both. Right for band-passed series,
 * which AR(1) does not describe: independent white noise through a band is rejected as often as the risk says.
 */
export function testedCorrelation(
  first: Float64Array,
  second: Float64Array,
  level = 0.95,
  longestLag = Math.floor(first.length / 4),
): TestedCorrelation {
  const { correlation, count } = pearsonCorrelation(first, second);
  const effectiveSize = effectiveSizeOverValid(
    Uint8Array.from(first, (value, t) => (Number.isNaN(value + second[t]) ? 0 : 1)),
    autocorrelation(first, longestLag),
    autocorrelation(second, longestLag),
  );
  return {
    correlation,
    count,
    effectiveSize,
    pValue: correlationPValue(correlation, effectiveSize),
    ...correlationInterval(correlation, effectiveSize, level),
  };
}
