import type { TimeAxis } from "../model/axis";
import { Fault } from "../model/errors";
import { type BandFilter, bandResponse, lanczosBand } from "../numeric/band-filter";
import type { BandSettings } from "./schema";

/**
 * The study's filter for a record's sampling, or null for "none". Errors (Fault "band"): an irregular record, a shortest
 * period below twice the sampling, edges out of order, a record shorter than the longest period.
 */
export function bandFilter(settings: BandSettings, time: TimeAxis): BandFilter | null {
  if (settings.filter === "none") return null;
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
  const { shortestDays, longestDays } = settings;
  if (shortestDays < 2 * stepDays) {
    throw bandFault(
      "band.shortestDays",
      `at least twice the sampling of ${tidy(stepDays)} days`,
      `${tidy(shortestDays)} days`,
      `choose ${tidy(2 * stepDays)} days or more`,
    );
  }
  if (longestDays <= shortestDays) {
    throw bandFault(
      "band.longestDays",
      `more than the shortest period of ${tidy(shortestDays)} days`,
      `${tidy(longestDays)} days`,
      "choose a longer period for the long edge",
    );
  }
  const spanDays = dates * stepDays;
  if (longestDays > spanDays) {
    throw bandFault(
      "band.longestDays",
      `at most the record's length of ${tidy(spanDays)} days`,
      `${tidy(longestDays)} days`,
      'choose a shorter period, a longer record, or set "filter" to "none"',
    );
  }
  return lanczosBand(shortestDays / stepDays, longestDays / stepDays);
}

/** Amplitude response of the filter at frequencies in cycles a day. 1 everywhere for no filter. */
export function responseAt(filter: BandFilter | null, frequencyPerDay: Float64Array, stepDays: number): Float64Array {
  return frequencyPerDay.map((frequency) => (filter ? bandResponse(filter, frequency * stepDays) : 1));
}

function bandFault(where: string, expected: string, got: string, advice: string): Fault {
  return new Fault({ tag: "band", where, expected, got, advice });
}

function tidy(days: number): string {
  return String(Number(days.toFixed(3)));
}
