import type { FoundJet } from "../../jets/eddy-test/found-jet";
import type { FollowSettings } from "../../jets/follow/follow-jets";
import { type FollowedJet, followJets } from "../../jets/follow/jet-lines";
import type { ExtremeSettings } from "../../jets/ridges/find-extremes";
import { findRidges, type RidgeDate } from "../../jets/ridges/find-ridges";
import type { EarthSettings } from "../../ocean/earth";

export interface JetRules {
  readonly extreme: ExtremeSettings;
  readonly follow: FollowSettings;
}

/** Lines of extremes through a latitude–time matrix `matrix[row * days.length + t]` of eastward velocity, and the dates' extremes. */
export function findJetLines(
  matrix: Float64Array,
  latitude: Float64Array,
  days: Float64Array,
  rules: JetRules,
  earth: EarthSettings,
): { readonly lines: FollowedJet[]; readonly ridges: RidgeDate[] } {
  const ridges = findRidges(matrix, latitude, days, rules.extreme, earth);
  return { lines: followJets(ridges, latitude, rules.follow, earth), ridges };
}

/** Lines that live long enough to be called jets. A line seen once lives one step. */
export function longLived(lines: readonly FollowedJet[], stepDays: number, leastLifetimeDays: number): FollowedJet[] {
  return lines.filter(({ days }) => days[days.length - 1] - days[0] + stepDays >= leastLifetimeDays);
}

/** What the eddy test weighs of a line. */
export function weighed(line: FollowedJet, datesWithData: number): FoundJet {
  const mean = (values: Float64Array) => values.reduce((sum, value) => sum + value, 0) / values.length;
  return {
    latitudeDegrees: mean(line.latitudes),
    direction: line.sign,
    speedMetresPerSecond: Math.abs(mean(line.speeds)),
    shareOfDates: line.dates.length / datesWithData,
  };
}

/** Mean distance in degrees between neighbouring extremes of one direction on a date, over dates that show two or more; NaN for none. */
export function meanSpacingDegrees(ridges: readonly RidgeDate[]): number {
  let sum = 0;
  let count = 0;
  for (const { extremes } of ridges) {
    for (const sign of [1, -1]) {
      const own = extremes.filter((extreme) => extreme.sign === sign).map(({ latitude }) => latitude);
      own.sort((a, b) => a - b);
      for (let i = 1; i < own.length; i++) {
        sum += own[i] - own[i - 1];
        count++;
      }
    }
  }
  return count > 0 ? sum / count : Number.NaN;
}
