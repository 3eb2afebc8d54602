import type { TimeAxis } from "../model/axis";
import { Fault } from "../model/errors";
import { lanczosFilter } from "../numeric/band-filter";
import { butterworthSections } from "../numeric/filters/butterworth";
import { crossingPeriods } from "../numeric/filters/crossing-periods";
import { bridgedSamples } from "../numeric/filters/pieces";
import { FilterRefusal } from "../numeric/filters/refusal";
import { butterworthTimeFilter } from "./butterworth-time-filter";
import { lanczosTimeFilter } from "./lanczos-time-filter";
import type { HeightRecord } from "./record";
import { runningMeanTimeFilter } from "./running-mean-time-filter";
import type { BandSettings } from "./schema";
import type { TimeFilter } from "./time-filter";

/**
 * The study's filter for a record's sampling, or null for "none". Errors (Fault "band"): an irregular record, a shortest
 * period below twice the sampling, edges out of order or both open, a record shorter than the longest period.
 */
export function timeFilter(settings: BandSettings, time: TimeAxis): TimeFilter | null {
  if (settings.filter === "none") return null;
  checkBand(settings, time);
  const { shortestDays, longestDays } = settings;
  const bridge = bridgeOf(settings, time);
  const samples = (days: number | null) => (days === null ? null : days / time.step);
  switch (settings.filter) {
    case "lanczos":
      return lanczosTimeFilter(
        lanczosFilter({ shortestSamples: samples(shortestDays), longestSamples: samples(longestDays) }),
        bridge,
      );
    case "butterworth":
      return butterworthTimeFilter(sectionsOf(settings, time.step), bridge);
    case "running-mean": {
      const window = (days: number | null) => (days === null ? null : Math.max(1, Math.round(days / time.step)));
      return runningMeanTimeFilter(window(shortestDays), window(longestDays), bridge);
    }
  }
}

/** 1 on dates without data that the study's filter bridges. */
export function bridgedDates(
  settings: BandSettings,
  { time, hasData }: Pick<HeightRecord, "time" | "hasData">,
): Uint8Array {
  return bridgedSamples(hasData, bridgeOf(settings, time));
}

/** Longest gap that is bridged, in dates. */
function bridgeOf({ bridgeDays }: BandSettings, time: TimeAxis): number {
  return Math.floor(bridgeDays / time.step + 1e-9);
}

function sectionsOf({ order, cut, shortestDays, longestDays }: BandSettings, stepDays: number) {
  const samples = (days: number | null) => (days === null ? null : days / stepDays);
  try {
    return butterworthSections({
      order,
      cut,
      shortestSamples: samples(shortestDays),
      longestSamples: samples(longestDays),
    });
  } catch (error) {
    if (error instanceof FilterRefusal) throw new Fault(error.parts, { cause: error });
    throw error;
  }
}

function checkBand({ shortestDays, longestDays, filter }: BandSettings, time: TimeAxis): void {
  const stepDays = time.step;
  const dates = time.values.length;
  if (dates < 2 || !(stepDays > 0)) {
    throw bandFault(
      "band",
      "a record of many dates to filter",
      `${dates} date`,
      'choose a longer period or set "filter" to "none"',
    );
  }
  if (!time.even) {
    throw bandFault("band", "dates an even step apart", "an irregular record", 'set "filter" to "none"');
  }
  if (shortestDays === null && longestDays === null) {
    throw bandFault("band", "a shortest or a longest period", "both open", 'name one, or set "filter" to "none"');
  }
  if (shortestDays !== null && shortestDays < 2 * stepDays) {
    throw bandFault(
      "band.shortestDays",
      `at least twice the sampling of ${tidy(stepDays)} days`,
      `${tidy(shortestDays)} days`,
      `choose ${tidy(2 * stepDays)} days or more`,
    );
  }
  if (longestDays !== null && longestDays <= (shortestDays ?? 2 * stepDays)) {
    throw bandFault(
      "band.longestDays",
      `more than ${shortestDays === null ? "twice the sampling" : "the shortest period"} of ${tidy(shortestDays ?? 2 * stepDays)} days`,
      `${tidy(longestDays)} days`,
      "choose a longer period for the long edge",
    );
  }
  const slowest = longestDays ?? shortestDays ?? 0;
  const spanDays = dates * stepDays;
  if (slowest > spanDays) {
    throw bandFault(
      longestDays === null ? "band.shortestDays" : "band.longestDays",
      `at most the record's length of ${tidy(spanDays)} days`,
      `${tidy(slowest)} days`,
      `choose a shorter period, a longer record, or set "filter" to "none" (${filter} now)`,
    );
  }
}

/** Periods in days, shortest first, at which the filter's amplitude response crosses a level, within what the record can hold. */
export function crossingDays(filter: TimeFilter, level: number, time: TimeAxis): number[] {
  const samples = crossingPeriods(filter.response, level, 2, time.values.length);
  return samples.map((period) => period * time.step);
}

/** Amplitude response of the filter at frequencies in cycles a day. 1 everywhere for no filter. */
export function responseAt(filter: TimeFilter | null, frequencyPerDay: Float64Array, stepDays: number): Float64Array {
  return frequencyPerDay.map((frequency) => (filter ? filter.response(frequency * stepDays) : 1));
}

function bandFault(where: string, expected: string, got: string, advice: string): Fault {
  return new Fault({ tag: "band", where, expected, got, advice });
}

function tidy(days: number): string {
  return String(Number(days.toFixed(3)));
}
