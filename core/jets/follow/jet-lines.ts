import type { EarthSettings } from "../../ocean/earth";
import type { Extreme, FlowSign } from "../ridges/find-extremes";
import type { RidgeDate } from "../ridges/find-ridges";
import { type FollowSettings, followExtremes, halfWidthDegrees, strengthOf, type Track } from "./follow-jets";

/** How a jet begins: there already on the first date with data, out of nothing, or out of a living jet. */
export type Beginning =
  | { readonly kind: "record start" }
  | { readonly kind: "birth" }
  | { readonly kind: "split"; readonly from: number };

/** How a jet ends: still there on the last date with data, into nothing, or into a living jet. */
export type Ending =
  | { readonly kind: "record end" }
  | { readonly kind: "end" }
  | { readonly kind: "merger"; readonly into: number };

/** A followed jet. All arrays have one entry a date on which it was found. */
export interface FollowedJet {
  /** 1, 2, 3 … in order of first date, then latitude. */
  readonly id: number;
  readonly sign: FlowSign;
  /** Indices into the record's dates. */
  readonly dates: Int32Array;
  /** Days since 1970-01-01 in the record's calendar. */
  readonly days: Float64Array;
  /** Degrees north. */
  readonly latitudes: Float64Array;
  /** Eastward velocity at the core, m s-1. */
  readonly speeds: Float64Array;
  readonly widthsKm: Float64Array;
  readonly beginning: Beginning;
  readonly ending: Ending;
}

/**
 * Followed jets of a record with their births, ends, mergers and splits. A jet that is last seen on one date is a merger
 * where, on the next date with data, a jet of its sign that was there before lies within half a width (of the wider one) of
 * its last latitude and is not weaker than it was by more than the largest ratio; a birth is a split by the same rule
 * towards the past. A jet is one followed line: lines at the same
 * latitude with a longer gap between them are different jets and are not glued together.
 */
export function followJets(
  dates: readonly RidgeDate[],
  latitude: Float64Array,
  settings: FollowSettings,
  earth: EarthSettings,
): FollowedJet[] {
  const tracks = followExtremes(dates, latitude, settings, earth);
  const presence = presenceByDate(tracks, dates.length);
  const hasData = dates.map(({ observed }) => observed.includes(1));
  const beginningOf = (track: Track): Beginning => {
    const before = neighbourDate(hasData, track.dates[0], -1);
    if (before < 0) return { kind: "record start" };
    const living = presence[before].filter((other) => lastDate(other.track) >= track.dates[0]);
    const from = nearestCompanion(track.sign, track.extremes[0], living, settings, earth);
    return from === null ? { kind: "birth" } : { kind: "split", from };
  };
  const endingOf = (track: Track): Ending => {
    const after = neighbourDate(hasData, lastDate(track), 1);
    if (after < 0) return { kind: "record end" };
    const living = presence[after].filter((other) => other.track.dates[0] <= lastDate(track));
    const into = nearestCompanion(track.sign, track.extremes[track.extremes.length - 1], living, settings, earth);
    return into === null ? { kind: "end" } : { kind: "merger", into };
  };
  return tracks.map((track, i) => ({
    id: i + 1,
    sign: track.sign,
    dates: Int32Array.from(track.dates),
    days: Float64Array.from(track.dates, (date) => dates[date].day),
    latitudes: Float64Array.from(track.extremes, (extreme) => extreme.latitude),
    speeds: Float64Array.from(track.extremes, (extreme) => extreme.speed),
    widthsKm: Float64Array.from(track.extremes, (extreme) => extreme.widthKm),
    beginning: beginningOf(track),
    ending: endingOf(track),
  }));
}

/** A jet's entry on a date. */
interface Presence {
  readonly id: number;
  readonly track: Track;
  readonly extreme: Extreme;
}

function presenceByDate(tracks: readonly Track[], dates: number): Presence[][] {
  const presence: Presence[][] = Array.from({ length: dates }, () => []);
  tracks.forEach((track, i) => {
    track.dates.forEach((date, entry) => {
      presence[date].push({ id: i + 1, track, extreme: track.extremes[entry] });
    });
  });
  return presence;
}

/** The nearest living jet of a sign within half a width of an extreme and not much weaker than it, null for none. */
function nearestCompanion(
  sign: FlowSign,
  own: Extreme,
  living: readonly Presence[],
  settings: FollowSettings,
  earth: EarthSettings,
): number | null {
  let best: number | null = null;
  let nearest = Number.POSITIVE_INFINITY;
  for (const { id, track, extreme } of living) {
    if (track.sign !== sign || strengthOf(extreme) * settings.largestRatio < strengthOf(own)) continue;
    const distance = Math.abs(extreme.latitude - own.latitude);
    if (distance <= halfWidthDegrees(own, extreme, earth) && distance < nearest) {
      nearest = distance;
      best = id;
    }
  }
  return best;
}

function lastDate(track: Track): number {
  return track.dates[track.dates.length - 1];
}

/** Next date with data before or after, -1 for none. */
function neighbourDate(hasData: readonly boolean[], from: number, side: 1 | -1): number {
  for (let date = from + side; date >= 0 && date < hasData.length; date += side) if (hasData[date]) return date;
  return -1;
}
