import { persistenceByLatitude } from "../../../core/jets/persistence";
import { kilometresNorth } from "../../../core/jets/ridges/find-extremes";
import type { Sectors } from "../../../core/jets/ridges/sectors";
import type { JetsResult } from "../../../core/model/jets-result";
import { type BackgroundBasis, removeBackground } from "../../../core/numeric/background";
import { timeFilter } from "../../../core/study/band";
import { describeJets } from "../../../core/study/jets/describe-jets";
import { findJetLines, longLived, meanSpacingDegrees } from "../../../core/study/jets/find-jets";
import { redNoiseByLatitude } from "../../../core/study/jets/noise-test";
import { jetRules } from "../../../core/study/jets/settings";
import { bandLatitudeTime } from "../../../core/study/latitude-time";
import type { HeightRecord } from "../../../core/study/record";
import type { Study } from "../../../core/study/schema";
import type { JobFlags } from "../job";

/** What finding jets in a record's zonal means needs. `zonal[row * dates + t]` as it stands. */
export interface JetArguments {
  readonly record: Pick<HeightRecord, "axes" | "time" | "hasData">;
  readonly settings: Pick<Study, "band" | "jets" | "geostrophy">;
  readonly zonal: Float64Array;
  readonly basis: BackgroundBasis;
}

/** Finds, follows and describes the jets of a record in the study's band. */
export function jetsTask(
  args: JetArguments & {
    readonly sectors: Sectors;
    readonly sectorDates: Int32Array;
    readonly sectorMeans: Float64Array;
  },
  job: JobFlags,
): Omit<JetsResult, "key"> {
  job.poll();
  const { record, settings, zonal, basis } = args;
  const { latitude } = record.axes;
  const { time, hasData } = record;
  const rows = latitude.values.length;
  const every = Int32Array.from(time.values, (_, t) => t);
  const filter = timeFilter(settings.band, time);
  const matrix = bandLatitudeTime(zonal, rows, filter, basis, hasData, every);
  const rules = jetRules(settings.jets, matrix, latitude.step, time.step);
  const { lines, ridges } = findJetLines(matrix, latitude.values, time.values, rules, settings.geostrophy);
  const kept = longLived(lines, time.step, settings.jets.leastLifetimeDays);
  job.poll();
  const whole = new Float64Array(matrix.length);
  for (let row = 0; row < rows; row++) {
    const own = zonal.subarray(row * time.values.length, (row + 1) * time.values.length);
    whole.set(removeBackground(own, basis), row * time.values.length);
  }
  const spacing = meanSpacingDegrees(ridges);
  const middle = (latitude.values[0] + latitude.values[rows - 1]) / 2;
  const bridged = Math.floor(settings.band.bridgeDays / time.step);
  const { share, longestDays } = persistenceByLatitude(matrix, rows, time.step, bridged);
  return {
    jets: describeJets(
      kept,
      { latitude: latitude.values, time, hasData },
      ridges,
      { sectors: args.sectors, dates: args.sectorDates, means: args.sectorMeans },
      rules.extreme,
      settings.geostrophy,
    ),
    shorterLines: lines.length - kept.length,
    prominence: rules.extreme.leastProminence,
    spacingKm: kilometresNorth(middle - spacing / 2, middle + spacing / 2, settings.geostrophy),
    persistence: { share, longestDays },
    ...redNoiseByLatitude(whole, matrix, rows, (frequency) => (filter ? filter.response(frequency) : 1)),
  };
}
