import type { JobFlags } from "../job";
import { type FieldArguments, fieldOn, geometryOf } from "./field";

/**
 * Time mean of a field over the dates with data, cell by cell, in date order (so that the sum does not depend on how work is
 * shared out). NaN where a cell has no valid date. Counts one a date.
 */
export function meansTask(args: FieldArguments, job: JobFlags): Float64Array {
  const geometry = geometryOf(args.record, args.geostrophy);
  const cells = geometry.rows * geometry.columns;
  const sum = new Float64Array(cells);
  const count = new Int32Array(cells);
  for (let date = 0; date < args.record.cube.dates; date++) {
    job.poll();
    job.count();
    if (!args.record.hasData[date]) continue;
    const plane = fieldOn(args, geometry, date);
    for (let cell = 0; cell < cells; cell++) {
      if (Number.isNaN(plane[cell])) continue;
      sum[cell] += plane[cell];
      count[cell]++;
    }
  }
  return sum.map((value, cell) => (count[cell] > 0 ? value / count[cell] : Number.NaN));
}
