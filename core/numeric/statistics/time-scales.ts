/**
 * Integral time scale dt (1 + 2 sum r_k) from autocorrelations at lags 0, 1, …, summed up to the last lag before the first
 * that is not positive (all where none is); unit of `step`. dt (1 + r) / (1 - r) for AR(1). NaN where r_0 is.
 */
export function integralTimeScale(correlations: ArrayLike<number>, step: number): number {
  if (!(correlations[0] > 0)) return Number.NaN;
  let sum = 0;
  for (let k = 1; k < correlations.length && correlations[k] > 0; k++) sum += correlations[k];
  return step * (1 + 2 * sum);
}

/**
 * Lag at which the autocorrelation first falls to 1/e, in the unit of `step`: between lags the logarithm is interpolated
 * (exact for AR(1): -dt / ln r), or the value itself where it falls below zero. Infinity where the lags given do not fall so
 * far; NaN where a lag before is NaN.
 */
export function eFoldingTime(correlations: ArrayLike<number>, step: number): number {
  const target = Math.exp(-1);
  for (let k = 1; k < correlations.length; k++) {
    const here = correlations[k];
    const before = correlations[k - 1];
    if (Number.isNaN(here) || Number.isNaN(before)) return Number.NaN;
    if (here > target) continue;
    const share =
      here > 0 ? (Math.log(before) + 1) / (Math.log(before) - Math.log(here)) : (before - target) / (before - here);
    return step * (k - 1 + share);
  }
  return Number.POSITIVE_INFINITY;
}
