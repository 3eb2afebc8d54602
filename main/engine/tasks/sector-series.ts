import { type Sectors, sectorMeans } from "../../../core/jets/ridges/sectors";
import { leastZonalCoverage } from "../../../core/study/reduction";
import type { JobFlags } from "../job";
import { type FieldArguments, fieldSource } from "./field";

/** Means of u over longitude sectors on the dates given: `out[(i * sectors + s) * rows + row]`. Counts one a date. */
export function sectorSeriesTask(
  args: FieldArguments & { readonly sectors: Sectors; readonly dates: Int32Array },
  job: JobFlags,
): Float64Array {
  const source = fieldSource(args);
  const { rows } = source.geometry;
  const perDate = args.sectors.middle.length * rows;
  const out = new Float64Array(args.dates.length * perDate);
  args.dates.forEach((date, i) => {
    job.poll();
    out.set(sectorMeans(source.on(date)("u"), rows, args.record.ocean, args.sectors, leastZonalCoverage), i * perDate);
    job.count();
  });
  return out;
}
