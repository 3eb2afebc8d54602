import { studentQuantile, studentTwoSided } from "../distributions";
import { autocorrelation, effectiveSizeOfMean } from "../serial-correlation";
import { compensatedSum } from "./compensated-sum";

export interface FittedLine {
  readonly slope: number;
  readonly intercept: number;
  /** Standard error of the slope, and the two-sided limits and p value (of no slope) that follow from Student's t. */
  readonly slopeError: number;
  readonly low: number;
  readonly high: number;
  readonly pValue: number;
  readonly effectiveSize: number;
  /** Values less the line; NaN where a value is. */
  readonly residuals: Float64Array;
}

/**
 * Least-squares line of values by position with limits for serially correlated residuals: the residual variance and Student's
 * t take N_eff - 2 degrees of freedom. `effectiveSize` is N_eff; where not given it is N (1 - r) / (1 + r) with r the
 * residuals' lag-one correlation in the order given (even steps assumed). NaN samples are left out; limits are NaN where
 * N_eff <= 2. Ref: Santer et al. 2000, J. Geophys. Res. 105, 7337-7356 [from memory].
 */
export function fitLine(
  positions: Float64Array,
  values: Float64Array,
  level = 0.95,
  effectiveSize?: number,
): FittedLine {
  const valid = Array.from(values.keys()).filter((i) => !Number.isNaN(values[i] + positions[i]));
  const count = valid.length;
  const xMean = compensatedSum(valid.map((i) => positions[i])) / count;
  const yMean = compensatedSum(valid.map((i) => values[i])) / count;
  const extent = compensatedSum(valid.map((i) => (positions[i] - xMean) ** 2));
  const slope = compensatedSum(valid.map((i) => (positions[i] - xMean) * (values[i] - yMean))) / extent;
  const residuals = values.map((value, i) => value - yMean - slope * (positions[i] - xMean));
  const squares = compensatedSum(valid.map((i) => residuals[i] ** 2));
  const size = Math.min(count, effectiveSize ?? sizeOfResiduals(residuals, count));
  const degrees = size - 2;
  const slopeError = degrees > 0 ? Math.sqrt(squares / degrees / extent) : Number.NaN;
  const half = studentQuantile((1 + level) / 2, degrees) * slopeError;
  return {
    slope,
    intercept: yMean - slope * xMean,
    slopeError,
    low: slope - half,
    high: slope + half,
    pValue: degrees > 0 ? studentTwoSided(slope / slopeError, degrees) : Number.NaN,
    effectiveSize: size,
    residuals,
  };
}

/** A perfect fit leaves no residuals to correlate: all samples count. */
function sizeOfResiduals(residuals: Float64Array, count: number): number {
  const lagOne = autocorrelation(residuals, 1)[1];
  return Number.isNaN(lagOne) ? count : effectiveSizeOfMean(count, lagOne);
}
