import { estimatePopulation } from "../../../core/jets/eddy-test/estimate-population";
import { matchEnergy, northwardVariance } from "../../../core/jets/eddy-test/match-energy";
import { type EddyPopulation, overridePopulation } from "../../../core/jets/eddy-test/population";
import { planeOf } from "../../../core/model/cube";
import { geometryOf } from "../../../core/study/geometry";
import { thinnedDates } from "../../../core/study/latitude-time";
import type { HeightRecord } from "../../../core/study/record";
import type { Study } from "../../../core/study/schema";
import type { JobFlags } from "../job";

/** Dates whose northward currents the eddies' energy is matched to. */
const energyDates = 60;

/**
 * The eddies of a record, as its maps show them: estimated from heights less each cell's mean, as energetic as the record's
 * northward currents, with what the study sets by hand in place of estimates.
 */
export function eddyPopulationTask(
  args: { readonly record: HeightRecord; readonly study: Pick<Study, "geostrophy" | "eddyTest"> },
  job: JobFlags,
): EddyPopulation {
  const { record, study } = args;
  const geometry = geometryOf(record.axes, study.geostrophy);
  const anomaly = (date: number) => planeOf(record.cube, date).map((value, cell) => value - record.mean[cell]);
  const heights = { dates: record.cube.dates, stepDays: record.time.step, hasData: record.hasData, plane: anomaly };
  const poll = () => job.poll();
  const estimated = estimatePopulation(heights, record.axes, study.geostrophy, undefined, poll);
  const dates = Array.from(thinnedDates(record.cube.dates, energyDates)).filter((date) => record.hasData[date]);
  const variance = northwardVariance(anomaly, dates, geometry, poll);
  return overridePopulation(matchEnergy(estimated, variance, geometry), study.eddyTest.population);
}
