import type { BackgroundBasis } from "../../../core/numeric/background";
import { backgroundPlanes } from "../../../core/study/background-planes";
import type { HeightRecord } from "../../../core/study/record";
import type { JobFlags } from "../job";

/** Fits the background of a range of rows into the shared coefficients. Counts one a row. */
export function backgroundTask(
  args: {
    readonly record: HeightRecord;
    readonly basis: BackgroundBasis;
    readonly rows: readonly [number, number];
    readonly coefficients: Float64Array;
  },
  job: JobFlags,
): void {
  backgroundPlanes(args.record, args.basis, args.rows, args.coefficients, () => job.poll());
  for (let row = args.rows[0]; row < args.rows[1]; row++) job.count();
}
