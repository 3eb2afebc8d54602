import { normalQuantile, studentQuantile } from "../numeric/distributions";
import { meanAndDeviation } from "../numeric/serial-correlation";
import { theilSenLine } from "../numeric/statistics/theil-sen";
import { type EarthSettings, metresPerRadianNorth } from "../ocean/earth";
import type { FollowedJet } from "./follow/jet-lines";
import { type Memory, memoryOf } from "./memory";
import type { FlowSign } from "./ridges/find-extremes";
import type { ZonalExtent } from "./ridges/zonal-extent";

/** What a jet is described against. */
export interface JetContext {
  /** 1 where the record's date has data. */
  readonly hasData: Uint8Array;
  /** Days between dates. */
  readonly stepDays: number;
  readonly yearDays: number;
  readonly earth: EarthSettings;
  /** Extents of this jet on those dates on which sectors were looked at; empty where none were. */
  readonly extents: readonly ZonalExtent[];
}

/** A slope with the ends of its 95 % confidence interval. */
export interface Rate {
  readonly value: number;
  readonly low95: number;
  readonly high95: number;
}

/** One line of the table of jets. Latitudes in degrees north, speeds eastward in m s-1. NaN where there is too little to tell. */
export interface JetSummary {
  readonly id: number;
  readonly sign: FlowSign;
  readonly meanLatitude: number;
  readonly southernmost: number;
  readonly northernmost: number;
  readonly meanSpeed: number;
  /** The strongest, with the jet's sign. */
  readonly peakSpeed: number;
  readonly meanWidthKm: number;
  /** Mean share of sectors in which the jet shows, and mean tilt; see `ZonalExtent`. */
  readonly zonalExtent: number;
  readonly tiltDegreesPerDegree: number;
  readonly tilt: number;
  readonly firstDay: number;
  readonly lastDay: number;
  /** From first to last date, both included: a jet seen once lives one step. */
  readonly lifetimeDays: number;
  /** Dates on which it was found, and their share of the dates with data during its life. */
  readonly datesFound: number;
  readonly shareOfDaysPresent: number;
  readonly driftDegreesPerYear: Rate;
  readonly driftMetresPerSecond: Rate;
  /** Of the latitude less its drift, and of the speed. */
  readonly latitudeMemory: Memory;
  readonly speedMemory: Memory;
}

/** Most dates that enter the slope of all pairs; longer lives are thinned evenly. */
const mostSlopeDates = 600;
const secondsPerDay = 86400;

/**
 * Describes a followed jet. Drift is the Theil-Sen slope of latitude in time; its limits allow for serial correlation by the
 * effective size of the latitudes less that slope (see `memoryOf`), and for that size being small by Student's t in place
 * of the normal quantile. Rates are NaN for a jet found on fewer than five dates.
 */
export function describeJet(jet: FollowedJet, context: JetContext): JetSummary {
  const { stepDays, hasData } = context;
  const found = jet.dates.length;
  const first = jet.dates[0];
  const last = jet.dates[found - 1];
  const meanLatitude = mean(jet.latitudes);
  const { drift, latitudeMemory } = driftOf(jet, context);
  const perSecond =
    ((metresPerRadianNorth((meanLatitude * Math.PI) / 180, context.earth) * Math.PI) / 180 / context.yearDays) *
    (1 / secondsPerDay);
  return {
    id: jet.id,
    sign: jet.sign,
    meanLatitude,
    southernmost: jet.latitudes.reduce((a, b) => Math.min(a, b)),
    northernmost: jet.latitudes.reduce((a, b) => Math.max(a, b)),
    meanSpeed: mean(jet.speeds),
    peakSpeed:
      jet.sign * jet.speeds.reduce((most, speed) => Math.max(most, jet.sign * speed), Number.NEGATIVE_INFINITY),
    meanWidthKm: mean(jet.widthsKm),
    zonalExtent: meanOf(context.extents, ({ share }) => share),
    tiltDegreesPerDegree: meanOf(context.extents, ({ tiltDegreesPerDegree }) => tiltDegreesPerDegree),
    tilt: meanOf(context.extents, ({ tilt }) => tilt),
    firstDay: jet.days[0],
    lastDay: jet.days[found - 1],
    lifetimeDays: jet.days[found - 1] - jet.days[0] + stepDays,
    datesFound: found,
    shareOfDaysPresent: found / hasData.subarray(first, last + 1).reduce((sum, value) => sum + value, 0),
    driftDegreesPerYear: drift,
    driftMetresPerSecond: scaled(drift, perSecond),
    latitudeMemory,
    speedMemory: memoryOf(onEvenDates(jet, jet.speeds), stepDays, 1),
  };
}

function driftOf(jet: FollowedJet, { stepDays, yearDays }: JetContext): { drift: Rate; latitudeMemory: Memory } {
  const found = jet.dates.length;
  if (found < 5) {
    const unknown = { value: Number.NaN, low95: Number.NaN, high95: Number.NaN };
    return { drift: unknown, latitudeMemory: memoryOf(onEvenDates(jet, jet.latitudes), stepDays, 1) };
  }
  const stride = Math.ceil(found / mostSlopeDates);
  const thinned = Int32Array.from({ length: Math.ceil(found / stride) }, (_, i) => i * stride);
  const years = jet.days.map((day) => (day - jet.days[0]) / yearDays);
  const positions = Float64Array.from(thinned, (i) => years[i]);
  const values = Float64Array.from(thinned, (i) => jet.latitudes[i]);
  const { slope } = theilSenLine(positions, values);
  const residuals = jet.latitudes.map((latitude, i) => latitude - slope * years[i]);
  const latitudeMemory = memoryOf(onEvenDates(jet, residuals), stepDays, 2);
  const { low, high } = theilSenLine(positions, values, 0.95, sizeForNormalLimits(latitudeMemory.effectiveSize));
  return { drift: { value: slope, low95: low, high95: high }, latitudeMemory };
}

/** The size for which limits by the normal quantile are as wide as Student's for the effective size. */
function sizeForNormalLimits(effectiveSize: number): number {
  const ratio = normalQuantile(0.975) / studentQuantile(0.975, Math.max(1, effectiveSize - 2));
  return effectiveSize * ratio * ratio;
}

/** Values given on the jet's dates on the record's even dates, NaN where it was not found. */
function onEvenDates(jet: FollowedJet, values: Float64Array): Float64Array {
  const first = jet.dates[0];
  const series = new Float64Array(jet.dates[jet.dates.length - 1] - first + 1).fill(Number.NaN);
  values.forEach((value, i) => {
    series[jet.dates[i] - first] = value;
  });
  return series;
}

function scaled({ value, low95, high95 }: Rate, factor: number): Rate {
  return { value: value * factor, low95: low95 * factor, high95: high95 * factor };
}

function mean(values: Float64Array): number {
  return meanAndDeviation(values).mean;
}

function meanOf<T>(items: readonly T[], pick: (item: T) => number): number {
  return mean(Float64Array.from(items, pick));
}
