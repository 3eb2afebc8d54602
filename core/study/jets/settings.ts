import { defaultFollowSettings, type FollowSettings } from "../../jets/follow/follow-jets";
import { defaultProminence, type ExtremeSettings } from "../../jets/ridges/find-extremes";
import type { JetSettings } from "../schema";

/** How extremes are found and followed in one record under a study's settings; `matrix` decides "auto" prominence. */
export function jetRules(
  settings: JetSettings,
  matrix: Float64Array,
  latitudeStep: number,
  stepDays: number,
): { readonly extreme: ExtremeSettings; readonly follow: FollowSettings } {
  return {
    extreme: {
      leastProminence: settings.prominence === "auto" ? defaultProminence(matrix) : settings.prominence,
      againstFlow: false,
    },
    follow: {
      ...defaultFollowSettings(latitudeStep),
      fastestDegreesPerDay: settings.fastestDegreesPerDay,
      longestGapDates: Math.floor(settings.longestGapDays / stepDays + 1e-9),
    },
  };
}
