import { columnWeights, zonalMeans } from "../../../core/study/reduction";
import type { JobFlags } from "../job";
import { type FieldArguments, fieldOn, geometryOf } from "./field";

/**
 * Zonal means of a band-passed field on the dates given, map by map: for quantities that are not linear in height and so
 * cannot be filtered after reduction. Row-major dates × rows. Counts one a date.
 */
export function zonalBandTask(args: FieldArguments & { readonly dates: Int32Array }, job: JobFlags): Float64Array {
  const geometry = geometryOf(args.record, args.geostrophy);
  const weights = columnWeights(args.record);
  const out = new Float64Array(args.dates.length * geometry.rows);
  args.dates.forEach((date, i) => {
    job.poll();
    out.set(zonalMeans(fieldOn(args, geometry, date), args.record, weights), i * geometry.rows);
    job.count();
  });
  return out;
}
