import { autocorrelation } from "../numeric/serial-correlation";
import { eFoldingTime, integralTimeScale } from "../numeric/statistics/time-scales";

/** How long a series remembers itself, in days, and how many independent values it is worth. */
export interface Memory {
  readonly eFoldingDays: number;
  readonly integralDays: number;
  readonly effectiveSize: number;
}

/**
 * Memory of a series on even dates `stepDays` apart, NaN where missing, from its autocorrelation, the integral summed up to
 * the first zero. Effective size: valid values over the integral time in steps, within 1 … their number.
 *
 * Taking `fitted` functions (1: a mean, 2: a mean and a slope) off a series of memory T and length D takes about
 * fitted × T / D of its variance with it, which makes short series look more forgetful than they are. Autocorrelations are
 * raised by that share, and T found from them anew until it settles. Our correction, no source; it leaves long series alone.
 * A series that does not vary counts every value, with NaN times.
 */
export function memoryOf(series: Float64Array, stepDays: number, fitted: 1 | 2): Memory {
  const length = series.length;
  const valid = series.reduce((count, value) => count + (Number.isNaN(value) ? 0 : 1), 0);
  // The biased estimate shrinks with the lag; half the series is as far as it can be undone.
  const plain = autocorrelation(series, Math.floor(length / 2)).map((value, lag) => (value * length) / (length - lag));
  let correlations = plain;
  let integral = integralTimeScale(plain, 1);
  for (let pass = 0; pass < 5 && integral > 0; pass++) {
    const taken = Math.min(0.5, (fitted * integral) / length);
    correlations = plain.map((value) => value + taken * (1 - value));
    integral = integralTimeScale(correlations, 1);
  }
  return {
    eFoldingDays: eFoldingTime(correlations, stepDays),
    integralDays: integral * stepDays,
    effectiveSize: Number.isNaN(integral) ? valid : Math.min(valid, Math.max(1, valid / integral)),
  };
}
