import { columnWeights, type ReductionTarget, reducePlane } from "../../../core/study/reduction";
import type { JobFlags } from "../job";
import { type FieldArguments, fieldSource } from "./field";

/** Reduces a range of dates into the shared target. Counts one a date. */
export function reduceTask(
  args: FieldArguments & { readonly dates: readonly [number, number]; readonly target: ReductionTarget },
  job: JobFlags,
): void {
  const source = fieldSource(args);
  const weights = columnWeights(args.record);
  for (let date = args.dates[0]; date < args.dates[1]; date++) {
    job.poll();
    reducePlane(source.on(date)(args.target.quantity), date, args.record, weights, args.target);
    job.count();
  }
}
