import type { EarthSettings } from "../../ocean/earth";
import { type Extreme, type ExtremeSettings, findExtremes } from "./find-extremes";

/** What was found on one date. */
export interface RidgeDate {
  /** Days since 1970-01-01 in the record's calendar. */
  readonly day: number;
  readonly extremes: readonly Extreme[];
  /** 1 where the row has a value on this date. */
  readonly observed: Uint8Array;
}

/**
 * Extremes on every date of a latitude-time matrix of eastward velocity in m s-1, `matrix[row * days.length + date]`; NaN
 * where missing. One entry a date, also for dates without data.
 */
export function findRidges(
  matrix: Float64Array,
  latitude: Float64Array,
  days: Float64Array,
  settings: ExtremeSettings,
  earth: EarthSettings,
): RidgeDate[] {
  const profile = new Float64Array(latitude.length);
  return Array.from(days, (day, date) => {
    for (let row = 0; row < profile.length; row++) profile[row] = matrix[row * days.length + date];
    return {
      day,
      extremes: findExtremes(profile, latitude, settings, earth),
      observed: Uint8Array.from(profile, (value) => (Number.isNaN(value) ? 0 : 1)),
    };
  });
}
