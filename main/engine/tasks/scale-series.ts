import { zonalityByAveraging } from "../../../core/jets/zonality";
import type { EnergyByPeriod, PeriodSpectrum } from "../../../core/model/scales-result";
import { type BackgroundBasis, backgroundBasis } from "../../../core/numeric/background";
import { quantityById } from "../../../core/ocean/quantities/evaluate";
import { regionSpectrum, unevenRegionSpectrum } from "../../../core/study/period-spectrum";
import { averagingBlocks } from "../../../core/study/scales/averaging";
import { energyByPeriod, withInterval, withPeriodogramInterval } from "../../../core/study/scales/energy-by-period";
import type { JobFlags } from "../job";

/** Fewest dates from which a spectrum is taken. */
const fewestDates = 16;

/**
 * What the sampled cells' series tell: zonality by averaging, the spectrum by period, energy by time scale. Uneven dates
 * leave the spectrum alone, a Lomb-Scargle periodogram: averages over blocks and shares of energy want even steps.
 */
export function scaleSeriesTask(
  args: {
    /** `u[cell * dates + date]`. */
    readonly u: Float32Array;
    readonly v: Float32Array;
    readonly cellWeights: Float64Array;
    readonly days: Float64Array;
    readonly stepDays: number;
    readonly even: boolean;
    readonly basis: BackgroundBasis;
    readonly weeksDays: number;
    readonly monthsDays: number;
  },
  job: JobFlags,
): {
  readonly zonality: { readonly days: Float64Array; readonly zonality: Float64Array };
  readonly period: PeriodSpectrum | null;
  readonly energy: EnergyByPeriod | null;
} {
  job.poll();
  job.count();
  const { cellWeights, days, stepDays } = args;
  const dates = days.length;
  const [u, v] = [Float64Array.from(args.u), Float64Array.from(args.v)];
  const blocks = args.even ? averagingBlocks(dates, stepDays) : [];
  const zonality = {
    days: Float64Array.from(blocks, (length) => length * stepDays),
    zonality: zonalityByAveraging({ u, v, dates, weights: cellWeights }, blocks),
  };
  if (dates < fewestDates) return { zonality, period: null, energy: null };
  if (!args.even) {
    const uneven = unevenRegionSpectrum(quantityById("u"), args.u, cellWeights, days, args.basis);
    return { zonality, period: uneven.density.length > 0 ? withPeriodogramInterval(uneven) : null, energy: null };
  }
  const spectrum = (id: "u" | "v", basis: BackgroundBasis) => {
    job.poll();
    return regionSpectrum(quantityById(id), args[id], cellWeights, stepDays, basis);
  };
  const meanAlone = backgroundBasis(days, { mean: true, trend: false, annual: false, semiannual: false }, 1);
  const [ofU, ofV] = [spectrum("u", meanAlone), spectrum("v", meanAlone)];
  const period = spectrum("u", args.basis);
  const known = ofU.segments > 0 && ofV.segments > 0;
  return {
    zonality,
    period: period.segments > 0 ? withInterval(period, stepDays) : null,
    energy: known
      ? energyByPeriod(meanEnergy(u, v, cellWeights, dates), [ofU, ofV], args.weeksDays, args.monthsDays)
      : null,
  };
}

function meanEnergy(u: Float64Array, v: Float64Array, weights: Float64Array, dates: number): number {
  let [sum, weight] = [0, 0];
  for (let i = 0; i < u.length; i++) {
    const energy = (u[i] * u[i] + v[i] * v[i]) / 2;
    if (Number.isNaN(energy)) continue;
    const own = weights[Math.floor(i / dates)];
    sum += own * energy;
    weight += own;
  }
  return sum / weight;
}
