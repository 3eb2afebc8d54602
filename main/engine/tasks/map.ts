import { columnWeights, zonalMeans } from "../../../core/study/reduction";
import type { JobFlags } from "../job";
import { type FieldArguments, fieldSource } from "./field";

/** One quantity's map on one date and its zonal means. */
export function mapTask(
  args: FieldArguments & { readonly quantity: string; readonly date: number },
  job: JobFlags,
): { readonly map: Float64Array; readonly onDate: Float64Array } {
  job.poll();
  const map = fieldSource(args).on(args.date)(args.quantity);
  return { map, onDate: zonalMeans(map, args.record, columnWeights(args.record)) };
}
