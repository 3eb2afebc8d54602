import { columnWeights, zonalMeans } from "../../../core/study/reduction";
import type { JobFlags } from "../job";
import { type FieldArguments, fieldOn, geometryOf } from "./field";

/** The field's map on one date and its zonal means. */
export function mapTask(
  args: FieldArguments & { readonly date: number },
  job: JobFlags,
): { readonly map: Float64Array; readonly onDate: Float64Array } {
  job.poll();
  const map = fieldOn(args, geometryOf(args.record, args.geostrophy), args.date);
  return { map, onDate: zonalMeans(map, args.record, columnWeights(args.record)) };
}
