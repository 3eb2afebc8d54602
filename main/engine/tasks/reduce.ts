import { planeOf } from "../../../core/model/cube";
import type { HeightRecord } from "../../../core/study/record";
import { columnWeights, type ReductionTarget, reduceDate } from "../../../core/study/reduction";
import type { GeostrophySettings } from "../../../core/study/schema";
import type { JobFlags } from "../job";
import { geometryOf } from "./field";

/** Reduces a range of dates into the shared target. Counts one a date. */
export function reduceTask(
  args: {
    readonly record: HeightRecord;
    readonly geostrophy: GeostrophySettings;
    readonly dates: readonly [number, number];
    readonly target: ReductionTarget;
  },
  job: JobFlags,
): void {
  const geometry = geometryOf(args.record, args.geostrophy);
  const weights = columnWeights(args.record);
  for (let date = args.dates[0]; date < args.dates[1]; date++) {
    job.poll();
    reduceDate(planeOf(args.record.cube, date), date, args.record, geometry, weights, args.target);
    job.count();
  }
}
