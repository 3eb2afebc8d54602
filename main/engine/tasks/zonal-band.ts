import { columnWeights, zonalMeans } from "../../../core/study/reduction";
import type { JobFlags } from "../job";
import { type FieldArguments, fieldSource } from "./field";

/**
 * Zonal means of one quantity on the dates given, map by map: for quantities that are not linear in height and so cannot be
 * filtered after reduction. Row-major dates × rows. Counts one a date.
 */
export function zonalBandTask(
  args: FieldArguments & { readonly quantity: string; readonly dates: Int32Array },
  job: JobFlags,
): Float64Array {
  const source = fieldSource(args);
  const weights = columnWeights(args.record);
  const { rows } = source.geometry;
  const out = new Float64Array(args.dates.length * rows);
  args.dates.forEach((date, i) => {
    job.poll();
    out.set(zonalMeans(source.on(date)(args.quantity), args.record, weights), i * rows);
    job.count();
  });
  return out;
}
