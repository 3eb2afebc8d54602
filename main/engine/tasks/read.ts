import type { GridWindow, MaskCounts } from "../../../core/model/source";
import type { GridIndex } from "../../readers/joined-grid";
import { readHeights } from "../../readers/read-heights";
import type { JobFlags } from "../job";

/** Reads a window's dates into the shared values, date `firstDate` of the index at their start. Counts one a date. */
export async function readTask(
  args: {
    readonly index: GridIndex;
    readonly window: GridWindow;
    readonly firstDate: number;
    readonly values: Float32Array | Float64Array;
  },
  job: JobFlags,
): Promise<MaskCounts> {
  return readHeights(
    args.index,
    args.window,
    (timeIndex, plane) => {
      args.values.set(plane, (timeIndex - args.firstDate) * plane.length);
      job.count();
    },
    { poll: () => job.poll() },
  );
}
