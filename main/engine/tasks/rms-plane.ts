import type { GridWindow } from "../../../core/model/source";
import type { GridIndex } from "../../readers/joined-grid";
import { readHeights } from "../../readers/read-heights";
import type { JobFlags } from "../job";

/** Root mean square over a window's dates of an indexed variable, cell by cell; NaN where it is never valid. */
export async function rmsPlaneTask(
  args: { readonly index: GridIndex; readonly window: GridWindow },
  job: JobFlags,
): Promise<Float64Array> {
  let squares = new Float64Array(0);
  let count = new Int32Array(0);
  await readHeights(
    args.index,
    args.window,
    (_, plane) => {
      if (squares.length === 0) {
        squares = new Float64Array(plane.length);
        count = new Int32Array(plane.length);
      }
      for (let cell = 0; cell < plane.length; cell++) {
        if (Number.isNaN(plane[cell])) continue;
        squares[cell] += plane[cell] * plane[cell];
        count[cell]++;
      }
    },
    { poll: () => job.poll() },
  );
  return squares.map((sum, cell) => (count[cell] > 0 ? Math.sqrt(sum / count[cell]) : Number.NaN));
}
