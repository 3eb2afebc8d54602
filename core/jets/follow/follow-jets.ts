import type { EarthSettings } from "../../ocean/earth";
import { degreesNorth, type Extreme, type FlowSign } from "../ridges/find-extremes";
import type { RidgeDate } from "../ridges/find-ridges";
import { leastCostMatching } from "./assignment";

export interface FollowSettings {
  /** Degrees of latitude a day; a jet moves no faster. */
  readonly fastestDegreesPerDay: number;
  /** Degrees allowed on top, whatever the time between dates: how far noise may shift a found latitude. */
  readonly latitudeNoiseDegrees: number;
  /** Dates with data on which a jet may be missing and still be the same jet when it shows again. */
  readonly longestGapDates: number;
  /** A jet's strength grows or fades by no more than this factor from one date it is found on to the next. */
  readonly largestRatio: number;
  /** Cost of a change of speed by its whole size, against a change of latitude by the whole gate. */
  readonly speedWeight: number;
}

/** Our choices, no source; `latitudeStep` is the grid's, in degrees. */
export function defaultFollowSettings(latitudeStep: number): FollowSettings {
  return {
    fastestDegreesPerDay: 0.05,
    latitudeNoiseDegrees: Math.abs(latitudeStep),
    longestGapDates: 3,
    largestRatio: 3,
    speedWeight: 0.5,
  };
}

/** A line of extremes of one sign that hang together from date to date. */
export interface Track {
  readonly sign: FlowSign;
  /** Indices into the dates given, ascending; bridged dates are left out. */
  readonly dates: number[];
  readonly extremes: Extreme[];
}

interface LiveTrack extends Track {
  missed: number;
}

/**
 * Follows extremes from date to date by least-cost matching, one sign at a time. A pair may match within half the width of
 * the wider of the two, within what the fastest migration allows since the jet was last seen, and within the largest ratio of
 * strengths (so that a jet that has died is not continued by the noise it leaves behind); its cost is the distance
 * over that gate plus the weighted relative change of speed. A jet left alone is kept for `longestGapDates` dates with data;
 * dates on which its latitude has no value do not count. Returned in order of first date, then latitude.
 */
export function followExtremes(
  dates: readonly RidgeDate[],
  latitude: Float64Array,
  settings: FollowSettings,
  earth: EarthSettings,
): Track[] {
  const tracks = ([1, -1] as const).flatMap((sign) => followOneSign(dates, latitude, sign, settings, earth));
  return tracks.sort((a, b) => a.dates[0] - b.dates[0] || a.extremes[0].latitude - b.extremes[0].latitude);
}

function followOneSign(
  dates: readonly RidgeDate[],
  latitude: Float64Array,
  sign: FlowSign,
  settings: FollowSettings,
  earth: EarthSettings,
): LiveTrack[] {
  const all: LiveTrack[] = [];
  let live: LiveTrack[] = [];
  dates.forEach((date, index) => {
    const found = date.extremes.filter((extreme) => extreme.sign === sign);
    const costs = new Float64Array(live.length * found.length);
    live.forEach((track, i) => {
      const last = track.extremes[track.extremes.length - 1];
      const elapsed = date.day - dates[track.dates[track.dates.length - 1]].day;
      found.forEach((extreme, j) => {
        costs[i * found.length + j] = matchCost(last, extreme, elapsed, settings, earth);
      });
    });
    // The dearest allowed pair costs just under this, so that two may always be joined that nobody else wants.
    const partner = leastCostMatching(costs, live.length, found.length, 1 + settings.speedWeight);
    const taken = new Uint8Array(found.length);
    live.forEach((track, i) => {
      if (partner[i] >= 0) {
        taken[partner[i]] = 1;
        track.dates.push(index);
        track.extremes.push(found[partner[i]]);
        track.missed = 0;
      } else if (date.observed[nearestRow(latitude, track.extremes[track.extremes.length - 1])]) track.missed++;
    });
    live = live.filter((track) => track.missed <= settings.longestGapDates);
    found.forEach((extreme, j) => {
      if (taken[j]) return;
      const born: LiveTrack = { sign, dates: [index], extremes: [extreme], missed: 0 };
      live.push(born);
      all.push(born);
    });
  });
  return all;
}

function matchCost(
  last: Extreme,
  next: Extreme,
  elapsedDays: number,
  settings: FollowSettings,
  earth: EarthSettings,
): number {
  const halfWidth = halfWidthDegrees(last, next, earth);
  const gate = Math.min(halfWidth, settings.latitudeNoiseDegrees + settings.fastestDegreesPerDay * elapsedDays);
  const distance = Math.abs(next.latitude - last.latitude);
  if (!(distance <= gate) || ratioOfStrengths(last, next) > settings.largestRatio) return Number.POSITIVE_INFINITY;
  const speeds = Math.abs(last.speed) + Math.abs(next.speed);
  const change = speeds > 0 ? Math.abs(next.speed - last.speed) / speeds : 0;
  return (gate > 0 ? distance / gate : 0) + settings.speedWeight * change;
}

function ratioOfStrengths(a: Extreme, b: Extreme): number {
  return Math.max(strengthOf(a) / strengthOf(b), strengthOf(b) / strengthOf(a));
}

/**
 * A jet's speed its own way in m s-1, at least 0.01: weaker flow, and maxima inside contrary flow, are all alike. Prominence
 * would not do: the still strip between two westward jets is a prominent eastward extreme.
 */
export function strengthOf({ sign, speed }: Extreme): number {
  return Math.max(sign * speed, 0.01);
}

/** Half the width of the wider of two extremes, in degrees of latitude. */
export function halfWidthDegrees(a: Extreme, b: Extreme, earth: EarthSettings): number {
  return degreesNorth(Math.max(a.widthKm, b.widthKm), a.latitude, earth) / 2;
}

function nearestRow(latitude: Float64Array, { row, latitude: at }: Extreme): number {
  for (const next of [row - 1, row + 1]) {
    if (Math.abs(latitude[next] - at) < Math.abs(latitude[row] - at)) return next;
  }
  return row;
}
