import { autocorrelation, effectiveSizeFromLags, meanAndDeviation } from "../../numeric/serial-correlation";
import { pearsonCorrelation } from "../../numeric/statistics/correlation";
import { fitLine } from "../../numeric/statistics/linear-regression";

/** Regression of the eddies' push on the flow itself. */
export interface EddyPush {
  /** Least-squares slope of convergence on flow, per day; positive: eddies push the jets along. */
  readonly perDay: number;
  /** Ends of the 95 % confidence interval. */
  readonly low95: number;
  readonly high95: number;
  readonly correlation: number;
  /** Pairs that entered, and how many independent ones they are worth. */
  readonly pairs: number;
  readonly effectivePairs: number;
}

/**
 * Slope of momentum-flux convergence (m s⁻²) on zonal-mean flow (m s⁻¹) over all latitudes and dates, both
 * `values[row * dates + date]`, NaN where missing. `about` "each latitude" takes each latitude's time mean off first (how
 * the push follows the flow in time); "all" one mean for all (steady jets count as well).
 *
 * The effective number of pairs is the number of pairs times the shares that remain in time and in latitude, each from the
 * products of the two fields' autocorrelations (Bretherton et al. 1999, J. Climate 12, 1990), averaged over rows and over
 * dates: neighbouring rows of a fine grid and neighbouring dates of a band-passed record are not independent. Confidence by
 * Student's t with effective pairs - 2; NaN limits where that is not positive.
 */
export function eddyPush(
  flow: Float64Array,
  convergence: Float64Array,
  rows: number,
  about: "each latitude" | "all",
): EddyPush {
  const dates = flow.length / rows;
  const x = anomalies(flow, convergence, rows, about);
  const y = anomalies(convergence, flow, rows, about);
  const { correlation, count: pairs } = pearsonCorrelation(x, y);
  const inTime = shareIndependent(x, y, rows, dates, "date");
  const inLatitude = shareIndependent(x, y, rows, dates, "row");
  const effectivePairs = Math.min(pairs, pairs * inTime * inLatitude);
  const { slope, low, high } = fitLine(x, y, 0.95, effectivePairs);
  return {
    perDay: slope * secondsPerDay,
    low95: low * secondsPerDay,
    high95: high * secondsPerDay,
    correlation,
    pairs,
    effectivePairs,
  };
}

const secondsPerDay = 86400;
/** Longest lag summed: beyond it a band-passed record's autocorrelation is chance alone. */
const mostLags = 1000;
/** Bound on the work: lines spread over all of them stand for the rest. */
const mostProducts = 1e8;

/** Values less their mean over the pairs that are valid in both; NaN elsewhere. */
function anomalies(values: Float64Array, other: Float64Array, rows: number, about: "each latitude" | "all") {
  const paired = values.map((value, i) => (Number.isNaN(other[i]) ? Number.NaN : value));
  const length = about === "all" ? values.length : values.length / rows;
  for (let start = 0; start < values.length; start += length) {
    const part = paired.subarray(start, start + length);
    const { mean } = meanAndDeviation(part);
    for (let i = 0; i < length; i++) part[i] -= mean;
  }
  return paired;
}

/** Mean share of the samples along one direction that are independent, 0 … 1; lines with under three values do not count. */
function shareIndependent(
  x: Float64Array,
  y: Float64Array,
  rows: number,
  dates: number,
  along: "date" | "row",
): number {
  const [lines, length] = along === "date" ? [rows, dates] : [dates, rows];
  const lags = Math.min(mostLags, Math.floor(length / 2));
  const first = new Float64Array(lags + 1);
  const second = new Float64Array(lags + 1);
  let used = 0;
  const affordable = Math.max(8, Math.floor(mostProducts / (length * lags)));
  const stride = Math.max(1, Math.ceil(lines / affordable));
  for (let line = 0; line < lines; line += stride) {
    const take = (values: Float64Array) =>
      Float64Array.from({ length }, (_, i) => values[along === "date" ? line * dates + i : i * dates + line]);
    const [own, others] = [take(x), take(y)];
    if (!(meanAndDeviation(own).count > 2 && meanAndDeviation(own).deviation > 0)) continue;
    if (!(meanAndDeviation(others).deviation > 0)) continue;
    used++;
    autocorrelation(own, lags).forEach((value, k) => {
      first[k] += value;
    });
    autocorrelation(others, lags).forEach((value, k) => {
      second[k] += value;
    });
  }
  if (used === 0) return 1;
  const mean = (sums: Float64Array) => sums.map((value) => value / used);
  return effectiveSizeFromLags(length, mean(first), mean(second)) / length;
}
