import { parabolaVertex } from "../../jets/ridges/vertex";
import type { Estimate } from "../../model/scales-result";
import { autocorrelation } from "../../numeric/serial-correlation";
import { blockLength, bootstrapStatistics, percentileInterval } from "../../numeric/statistics/block-bootstrap";

const resamples = 1000;
const seed = 1;

/**
 * Wavelength (inverse of the wavenumber's unit) at which wavenumber times density peaks: what carries most variance on a
 * logarithmic axis. The top is the parabola's through the highest bin and its
 * neighbours. NaN without a positive value; wavenumber 0
 * is left out.
 */
export function peakWavelength(wavenumber: Float64Array, density: Float64Array): number {
  const preserving = density.map((value, k) => value * wavenumber[k]);
  let best = 0;
  for (let k = 1; k < density.length; k++) if (preserving[k] > (best > 0 ? preserving[best] : 0)) best = k;
  if (best === 0) return Number.NaN;
  const inside = best > 1 && best < density.length - 1;
  return 1 / (inside ? parabolaVertex(wavenumber, preserving, best).at : wavenumber[best]);
}

/**
 * Peak of the mean of several dates' spectra, with percentile limits from 1000 resamples of whole blocks of dates (length
 * after Wilks from the lag-one autocorrelation of the dates' variance). Those are limits of sampling; no record of this length
 * tells neighbouring wavenumbers apart, so that the limits lie at least half a step of wavenumber to either side of the
 * peak. `densities` in order of date; NaN limits under eight dates.
 */
export function peakOfDates(wavenumber: Float64Array, densities: readonly Float64Array[]): Estimate {
  const meanOf = (indices: ArrayLike<number>): number => {
    const sum = new Float64Array(wavenumber.length);
    for (let i = 0; i < indices.length; i++) {
      const density = densities[indices[i]];
      for (let k = 0; k < sum.length; k++) sum[k] += density[k];
    }
    return peakWavelength(wavenumber, sum);
  };
  const count = densities.length;
  const value = meanOf(Array.from({ length: count }, (_, i) => i));
  if (count < 8) return { value, low95: Number.NaN, high95: Number.NaN };
  const variance = Float64Array.from(densities, (density) => density.reduce((sum, each) => sum + each, 0));
  const lagOne = autocorrelation(variance, 1)[1];
  const block = blockLength(count, Number.isNaN(lagOne) ? 0 : lagOne);
  const { low, high } = percentileInterval(bootstrapStatistics(count, meanOf, { block, resamples, seed }));
  const halfStep = (wavenumber[1] - wavenumber[0]) / 2;
  return {
    value,
    low95: Math.min(1 / (1 / value + halfStep), low),
    high95: Math.max(1 / (1 / value - halfStep), high),
  };
}
