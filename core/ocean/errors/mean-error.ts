import type { GridAxes } from "../../model/axis";

/** Error of a mean of several values whose errors are correlated. */
export interface MeanError {
  /** In the values' unit; NaN for no value. */
  readonly standardError: number;
  /** The number of independent values of the same mean variance that would leave this error. */
  readonly effectiveCount: number;
  /** Values in the mean. */
  readonly count: number;
}

/** exp(-d²/2L²) is below 1e-16 beyond this many L. */
const farthest = 8.6;

/**
 * Standard error of the plain mean of values at ascending `positions` with standard errors `sigmas` (NaN: no value) that are
 * correlated as exp(-d²/2L²), `length` L in the positions' unit; 0 for independent ones. On an axis that closes on itself
 * `turn` is its length and d the shorter way round. Ref: variance of a mean, textbook; Gaussian correlation: common practice.
 */
export function errorOfMean(
  sigmas: Float64Array,
  positions: Float64Array,
  length: number,
  turn = Number.POSITIVE_INFINITY,
): MeanError {
  let count = 0;
  let squares = 0;
  let products = 0;
  for (let i = 0; i < sigmas.length; i++) {
    if (Number.isNaN(sigmas[i])) continue;
    count++;
    squares += sigmas[i] * sigmas[i];
    if (length === 0) continue;
    for (let j = i + 1; j < sigmas.length; j++) {
      const ahead = positions[j] - positions[i];
      const distance = Math.min(ahead, turn - ahead);
      if (distance > farthest * length) {
        if (turn === Number.POSITIVE_INFINITY) break;
        continue;
      }
      if (Number.isNaN(sigmas[j])) continue;
      products += sigmas[i] * sigmas[j] * Math.exp(-(distance * distance) / (2 * length * length));
    }
  }
  const variance = (squares + 2 * products) / (count * count);
  // With every error 0 the ratio is 0/0; the count does not depend on the errors' size then.
  const effectiveCount = variance > 0 ? squares / count / variance : count;
  return { standardError: Math.sqrt(variance), effectiveCount, count };
}

export interface ZonalMeanErrors {
  /** One a row. */
  readonly standardError: Float64Array;
  readonly effectiveCount: Float64Array;
}

/**
 * Standard error of the zonal mean of each row of a quantity with the standard errors `errors` (row-major, NaN where it has no
 * value), correlated over `correlationKm` along the parallel. For u with height errors of that length this is what exact
 * propagation gives; v and vorticity also have errors of opposite sign along a parallel, which cancel, so that theirs is an upper bound.
 */
export function errorOfZonalMean(errors: Float64Array, axes: GridAxes, correlationKm: number): ZonalMeanErrors {
  const { latitude, longitude } = axes;
  const columns = longitude.values.length;
  const ascending = longitude.values[columns - 1] >= longitude.values[0] ? 1 : -1;
  const rows = Array.from(latitude.values, (value, row) => {
    const kmPerDegree = (6371 * Math.PI * Math.cos((value * Math.PI) / 180)) / 180;
    const positions = longitude.values.map((degrees) => ascending * degrees * kmPerDegree);
    const turn = longitude.periodic ? 360 * kmPerDegree : Number.POSITIVE_INFINITY;
    return errorOfMean(errors.subarray(row * columns, (row + 1) * columns), positions, correlationKm, turn);
  });
  return {
    standardError: Float64Array.from(rows, ({ standardError }) => standardError),
    effectiveCount: Float64Array.from(rows, ({ effectiveCount }) => effectiveCount),
  };
}

/**
 * Standard error of the time mean of a value with standard error `sigmas[t]` on `days[t]` (ascending; NaN: no value), correlated
 * over `correlationDays`. For a mean over time and longitude give the zonal means' errors: correlations in the two multiply.
 */
export function errorOfTimeMean(sigmas: Float64Array, days: Float64Array, correlationDays: number): MeanError {
  return errorOfMean(sigmas, days, correlationDays);
}
