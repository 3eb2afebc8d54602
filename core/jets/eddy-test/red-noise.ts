import { incompleteBeta, studentCumulative } from "../../numeric/distributions";
import { autocorrelation, effectiveSizeOfMean, meanAndDeviation } from "../../numeric/serial-correlation";

/** One latitude's series against red noise of its own persistence and variance. */
export interface RedNoiseResult {
  /** Lag-one correlation of the AR(1) fitted. */
  readonly lagOne: number;
  /** Student's t of the time mean with Leith's effective sample size; NaN where too few samples. */
  readonly meanT: number;
  /** Chance that red noise about zero has a mean as far from zero, two-sided. */
  readonly meanP: number;
  /** Variance within the band over what the red noise is expected to have there. */
  readonly bandRatio: number;
  /** Chance that red noise has as large a share of its variance in the band. */
  readonly bandP: number;
}

/**
 * Share of the variance of AR(1) noise at frequency `cyclesPerSample`, relative to white noise:
 * (1 - r²) / (1 + r² - 2 r cos 2 pi f). Ref: Gilman et al. 1963, J. Atmos. Sci. 20, 182-184 [from memory].
 */
export function redNoisePower(lagOne: number, cyclesPerSample: number): number {
  return (1 - lagOne * lagOne) / (1 + lagOne * lagOne - 2 * lagOne * Math.cos(2 * Math.PI * cyclesPerSample));
}

/**
 * Holds a series (regular dates, NaN where missing) and its band-passed version against AR(1) noise fitted to the series by
 * its lag-one correlation. Both tests are analytic. The mean: t with N (1 - r) / (1 + r) samples. The band: its share of the
 * series's variance, so that the noise level need not be known; the chance that a weighted sum of chi-squared pairs inside
 * the band outweighs one outside, each matched to a scaled chi-squared by mean and variance (Satterthwaite 1946, Biometrics
 * 2, 110-114), is that of an F ratio. `response(f)` is the band's amplitude response at f cycles a sample. What is in the band
 * raises r and so its own yardstick: the test errs towards noise (2 to 4 % of rejections at 5 % for r up to 0.8, fewer above).
 * NaN for series with fewer than 8 samples or no variance.
 */
export function redNoiseTest(
  series: Float64Array,
  banded: Float64Array,
  response: (cyclesPerSample: number) => number,
): RedNoiseResult {
  const { mean, deviation, count } = meanAndDeviation(series);
  if (count < 8 || !(deviation > 0)) {
    return { lagOne: Number.NaN, meanT: Number.NaN, meanP: Number.NaN, bandRatio: Number.NaN, bandP: Number.NaN };
  }
  const lagOne = Math.min(0.999, Math.max(-0.999, autocorrelation(series, 1)[1]));
  const size = effectiveSizeOfMean(count, lagOne);
  const meanT = mean / (deviation / Math.sqrt(size));
  const meanP = size > 1 ? 2 * studentCumulative(-Math.abs(meanT), size - 1) : 1;
  const share = meanSquareOf(banded) / (deviation * deviation);
  const power = squaredResponse(response, series.length);
  const expected = weightedNoise(lagOne, series.length, (k) => power[k]).mean;
  return { lagOne, meanT, meanP, bandRatio: share / expected, bandP: shareTail(share, lagOne, series.length, power) };
}

/** Chance that red noise has at least this share of its variance in the band. */
function shareTail(share: number, lagOne: number, samples: number, power: Float64Array): number {
  const inside = weightedNoise(lagOne, samples, (k) => Math.max(0, power[k] - share));
  const outside = weightedNoise(lagOne, samples, (k) => Math.max(0, share - power[k]));
  if (!(inside.mean > 0)) return 0;
  if (!(outside.mean > 0)) return 1;
  // P(F > x) for F with (a, b) degrees of freedom is I_(b / (b + a x)) (b/2, a/2). Ref: Abramowitz & Stegun 26.6.2.
  const [a, b] = [inside.degrees, outside.degrees];
  return incompleteBeta(b / (b + (a * outside.mean) / inside.mean), b / 2, a / 2);
}

function squaredResponse(response: (cyclesPerSample: number) => number, samples: number): Float64Array {
  return Float64Array.from({ length: Math.floor(samples / 2) + 1 }, (_, k) => response(k / samples) ** 2);
}

/**
 * Variance of AR(1) noise of unit variance, its frequencies k / samples weighted: mean, and the degrees of freedom of the
 * scaled chi-squared with that mean and the variance's own variance. The zero frequency is left out.
 */
export function weightedNoise(
  lagOne: number,
  samples: number,
  weightAt: (k: number) => number,
): { mean: number; degrees: number } {
  let sum = 0;
  let squares = 0;
  for (let k = 1; 2 * k <= samples; k++) {
    // The highest frequency of an even number of samples has one part, all others a cosine and a sine.
    const parts = 2 * k === samples ? 1 : 2;
    const weight = redNoisePower(lagOne, k / samples) * weightAt(k);
    sum += parts * weight;
    squares += parts * weight * weight;
  }
  return { mean: sum / samples, degrees: (sum * sum) / squares };
}

function meanSquareOf(series: Float64Array): number {
  let sum = 0;
  let count = 0;
  for (const value of series) {
    if (Number.isNaN(value)) continue;
    sum += value * value;
    count++;
  }
  return count > 0 ? sum / count : Number.NaN;
}
