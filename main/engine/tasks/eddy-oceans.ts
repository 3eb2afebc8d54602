import { eddyTestRange, type OceanJets } from "../../../core/jets/eddy-test/ocean-jets";
import { planOceans } from "../../../core/jets/eddy-test/ocean-plan";
import type { EddyPopulation } from "../../../core/jets/eddy-test/population";
import { timeFilter } from "../../../core/study/band";
import { findJetLines, type JetRules, longLived, weighed } from "../../../core/study/jets/find-jets";
import { bandLatitudeTime } from "../../../core/study/latitude-time";
import type { JobFlags } from "../job";
import type { JetArguments } from "./jets";

/**
 * Draws random oceans and takes each through the record's own chain: background, band, extremes (of the prominence used for
 * the record), lines, least lifetime. Counts one an ocean.
 */
export function eddyOceansTask(
  args: Omit<JetArguments, "zonal"> & {
    readonly ocean: Uint8Array;
    readonly rules: JetRules;
    readonly population: EddyPopulation;
    readonly range: { readonly from: number; readonly to: number; readonly seed: number };
  },
  job: JobFlags,
): OceanJets[] {
  const { record, settings, basis, rules } = args;
  const { axes, time, hasData } = record;
  const rows = axes.latitude.values.length;
  const every = Int32Array.from(time.values, (_, t) => t);
  const filter = timeFilter(settings.band, time);
  const datesWithData = hasData.reduce((sum, flag) => sum + flag, 0);
  const plan = planOceans(args.population, {
    latitude: axes.latitude,
    longitude: axes.longitude,
    days: time.values,
    hasData,
    ocean: args.ocean,
    earth: settings.geostrophy,
    equatorDegrees: settings.geostrophy.equatorDegrees,
    smoothing: { metres: 0, days: 0 },
    noiseMetresPerSecond: 0,
  });
  return eddyTestRange(
    plan,
    (zonal) => {
      const matrix = bandLatitudeTime(zonal, rows, filter, basis, hasData, every);
      const { lines } = findJetLines(matrix, axes.latitude.values, time.values, rules, settings.geostrophy);
      job.count();
      return longLived(lines, time.step, settings.jets.leastLifetimeDays).map((line) => weighed(line, datesWithData));
    },
    args.range,
    () => job.poll(),
  );
}
