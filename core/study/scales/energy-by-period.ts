import type { SpectrumResult } from "../../model/results";
import type { EnergyByPeriod, PeriodSpectrum } from "../../model/scales-result";
import { equivalentDegrees, spectrumInterval } from "../../numeric/spectra/confidence";
import { taperFamily } from "../../numeric/spectra/tapers";

/** A Welch spectrum (Hann, half overlap) with the limits of one series of its segments. */
export function withInterval(spectrum: SpectrumResult, stepDays: number): PeriodSpectrum {
  const length = Math.round(spectrum.segmentDays / stepDays);
  const hop = Math.max(1, length - Math.floor(length / 2));
  const starts = Array.from({ length: spectrum.segments }, (_, i) => i * hop);
  const degreesOfFreedom = equivalentDegrees(taperFamily({ kind: "hann" }, length), starts);
  const { low, high } = spectrumInterval(degreesOfFreedom);
  return { ...spectrum, degreesOfFreedom, lowFactor: low, highFactor: high };
}

/** A periodogram of uneven dates with the limits of one series: two degrees of freedom a frequency. */
export function withPeriodogramInterval(spectrum: SpectrumResult): PeriodSpectrum {
  const degreesOfFreedom = 2;
  const { low, high } = spectrumInterval(degreesOfFreedom);
  return { ...spectrum, degreesOfFreedom, lowFactor: low, highFactor: high };
}

/** Variance of a one-sided density between two frequencies; every bin stands for half a step to either side. */
export function varianceBetween({ frequency, density }: SpectrumResult, low: number, high: number): number {
  const step = frequency[1];
  const last = frequency[frequency.length - 1];
  let sum = 0;
  for (let k = 0; k < frequency.length; k++) {
    const from = Math.max(0, frequency[k] - step / 2, low);
    const to = Math.min(last, frequency[k] + step / 2, high);
    // The bins at zero and at the end stand for half a step alone, but for their whole variance.
    const width = Math.min(last, frequency[k] + step / 2) - Math.max(0, frequency[k] - step / 2);
    if (to > from && width > 0) sum += (density[k] * step * (to - from)) / width;
  }
  return sum;
}

/**
 * Shares of kinetic energy by period. `total` is the mean of (u² + v²) / 2 with the mean flow in it; `spectra` are those of
 * u and of v, mean removed and nothing filtered. What is not faster than `monthsDays` is "longer", the mean included.
 */
export function energyByPeriod(
  total: number,
  spectra: readonly [SpectrumResult, SpectrumResult],
  weeksDays: number,
  monthsDays: number,
): EnergyByPeriod {
  const energy = (low: number, high: number) =>
    (varianceBetween(spectra[0], low, high) + varianceBetween(spectra[1], low, high)) / 2 / total;
  const weeksShare = energy(1 / weeksDays, Number.POSITIVE_INFINITY);
  const monthsShare = energy(1 / monthsDays, 1 / weeksDays);
  return { total, weeksDays, monthsDays, weeksShare, monthsShare, longerShare: 1 - weeksShare - monthsShare };
}
