import type { BackgroundBasis } from "../../../core/numeric/background";
import type { BandFilter } from "../../../core/numeric/band-filter";
import { bandLatitudeTime } from "../../../core/study/latitude-time";
import type { JobFlags } from "../job";

/** Latitude–time matrix of a linear quantity in the band, from its zonal means. */
export function pictureTask(
  args: {
    readonly zonal: Float64Array;
    readonly rows: number;
    readonly filter: BandFilter | null;
    readonly basis: BackgroundBasis;
    readonly hasData: Uint8Array;
    readonly columns: Int32Array;
  },
  job: JobFlags,
): Float64Array {
  job.poll();
  return bandLatitudeTime(args.zonal, args.rows, args.filter, args.basis, args.hasData, args.columns);
}
