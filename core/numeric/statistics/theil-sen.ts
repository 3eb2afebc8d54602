import { normalQuantile } from "../distributions";
import { quantileOfSorted } from "./block-bootstrap";

export interface RobustLine {
  readonly slope: number;
  /** Median of the values less the slope times the median of the positions. */
  readonly intercept: number;
  readonly low: number;
  readonly high: number;
}

/**
 * Theil-Sen line: the median of the slopes of all pairs at unlike positions, with Sen's limits from the ranks of those slopes
 * (ties corrected). Units of values over units of positions. `effectiveSize` widens the limits for serial correlation by
 * sqrt(N / N_eff) of the deviation of Kendall's sum (Hamed & Rao 1998, J. Hydrology 204 [from memory]). NaN samples are left
 * out; NaN under two unlike positions. Work grows with the square of the samples. Ref: Sen 1968, J. Am. Stat. Assoc. 63, 1379-1389.
 */
export function theilSenLine(
  positions: Float64Array,
  values: Float64Array,
  level = 0.95,
  effectiveSize?: number,
): RobustLine {
  const valid = Array.from(values.keys()).filter((i) => !Number.isNaN(values[i] + positions[i]));
  const x = Float64Array.from(valid, (i) => positions[i]);
  const y = Float64Array.from(valid, (i) => values[i]);
  const slopes = pairSlopes(x, y);
  const slope = quantileOfSorted(slopes, 0.5);
  const count = x.length;
  const variance = (kendallTerm(count) - tieTerms(x) - tieTerms(y)) / 18;
  const inflation = count / Math.min(count, effectiveSize ?? count);
  const half = normalQuantile((1 + level) / 2) * Math.sqrt(variance * inflation);
  const lowest = Math.max(0, Math.round((slopes.length - half) / 2) - 1);
  const highest = Math.min(slopes.length - 1, Math.round((slopes.length + half) / 2));
  return {
    slope,
    intercept: quantileOfSorted(y.slice().sort(), 0.5) - slope * quantileOfSorted(x.slice().sort(), 0.5),
    low: slopes[lowest] ?? Number.NaN,
    high: slopes[highest] ?? Number.NaN,
  };
}

function pairSlopes(x: Float64Array, y: Float64Array): Float64Array {
  const slopes = new Float64Array((x.length * (x.length - 1)) / 2);
  let count = 0;
  for (let i = 0; i < x.length; i++) {
    for (let j = i + 1; j < x.length; j++) {
      if (x[i] !== x[j]) slopes[count++] = (y[j] - y[i]) / (x[j] - x[i]);
    }
  }
  return slopes.subarray(0, count).sort();
}

function kendallTerm(count: number): number {
  return count * (count - 1) * (2 * count + 5);
}

function tieTerms(values: Float64Array): number {
  const repeats = new Map<number, number>();
  for (const value of values) repeats.set(value, (repeats.get(value) ?? 0) + 1);
  let sum = 0;
  for (const count of repeats.values()) sum += kendallTerm(count);
  return sum;
}
