import { type EddyPush, eddyPush } from "../../jets/forcing/eddy-push";
import { eddyToMeanConversion, fluxConvergence } from "../../jets/forcing/flux-convergence";
import type { Meridian } from "../../jets/forcing/meridian";
import { absoluteVorticityGradient, signChanges } from "../../jets/forcing/vorticity-gradient";
import type { Estimate, ForcingResult, PushEstimate } from "../../model/scales-result";
import { studentQuantile } from "../../numeric/distributions";
import { autocorrelation, effectiveSizeFromLags, meanAndDeviation } from "../../numeric/serial-correlation";
import { blockMeans } from "./block-means";

/** Most columns of the picture of forcing. */
const mostColumns = 400;

/**
 * How eddies force the zonal-mean flow, from `flow` and `flux` (m s-1, m2 s-2), both `values[row * dates + date]`, NaN where
 * missing. The convergence is taken date by date; its mean is that of the mean flux wherever the same dates are valid.
 */
export function forcingOf(
  flow: Float64Array,
  flux: Float64Array,
  days: Float64Array,
  meridian: Meridian,
): ForcingResult {
  const rows = meridian.latitude.length;
  const dates = days.length;
  const convergence = new Float64Array(rows * dates);
  const energy = new Float64Array(dates);
  for (let date = 0; date < dates; date++) {
    const column = (matrix: Float64Array) =>
      Float64Array.from({ length: rows }, (_, row) => matrix[row * dates + date]);
    const pushed = fluxConvergence(column(flux), meridian);
    pushed.forEach((value, row) => {
      convergence[row * dates + date] = value;
    });
    energy[date] = eddyToMeanConversion(column(flow), pushed, meridian);
  }
  const mean = (matrix: Float64Array) =>
    Float64Array.from(
      { length: rows },
      (_, row) => meanAndDeviation(matrix.subarray(row * dates, (row + 1) * dates)).mean,
    );
  const meanFlow = mean(flow);
  const meanConvergence = mean(convergence);
  const gradient = absoluteVorticityGradient(meanFlow, meridian);
  const blocks = blockMeans(convergence, rows, days, mostColumns);
  return {
    meanFlow,
    flux: mean(flux),
    convergence: meanConvergence,
    latitudeTime: { rows, columns: blocks.days.length, values: Float32Array.from(blocks.values) },
    days: blocks.days,
    push: pushEstimate(eddyPush(flow, convergence, rows, "all")),
    pushInTime: pushEstimate(eddyPush(flow, convergence, rows, "each latitude")),
    pushOfMeans: pushEstimate(eddyPush(meanFlow, meanConvergence, rows, "all")),
    conversion: meanOfSeries(energy),
    gradient,
    signChanges: signChanges(gradient, meridian.latitude),
  };
}

function pushEstimate({ perDay, low95, high95, correlation, effectivePairs }: EddyPush): PushEstimate {
  return { perDay: { value: perDay, low95, high95 }, correlation, effectivePairs };
}

/** Mean of a series with limits by Student's t over its effective size (Bretherton et al. 1999). */
function meanOfSeries(series: Float64Array): Estimate {
  const { mean, deviation, count } = meanAndDeviation(series);
  const lags = autocorrelation(series, Math.floor(series.length / 4));
  // Beyond the first lag that is not positive there is chance alone.
  const end = lags.findIndex((value) => !(value > 0));
  const positive = end > 0 ? lags.subarray(0, end) : lags;
  const ones = new Float64Array(positive.length).fill(1);
  const size = effectiveSizeFromLags(count, positive, ones);
  const half = size > 2 ? (studentQuantile(0.975, size - 1) * deviation) / Math.sqrt(size) : Number.NaN;
  return { value: mean, low95: mean - half, high95: mean + half };
}
