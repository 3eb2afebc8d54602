import type { BackgroundBasis } from "../../../core/numeric/background";
import { timeFilter } from "../../../core/study/band";
import { bandLatitudeTime } from "../../../core/study/latitude-time";
import type { HeightRecord } from "../../../core/study/record";
import type { BandSettings } from "../../../core/study/schema";
import type { JobFlags } from "../job";

/** Latitude–time matrix of a linear quantity in the band, from its zonal means. */
export function pictureTask(
  args: {
    readonly zonal: Float64Array;
    readonly record: Pick<HeightRecord, "time" | "hasData">;
    readonly rows: number;
    readonly band: BandSettings;
    readonly basis: BackgroundBasis;
    readonly columns: Int32Array;
  },
  job: JobFlags,
): Float64Array {
  job.poll();
  const { time, hasData } = args.record;
  return bandLatitudeTime(args.zonal, args.rows, timeFilter(args.band, time), args.basis, hasData, args.columns);
}
