import { planesFrom } from "../../../core/ocean/quantities/evaluate";
import type { JobFlags } from "../job";
import { type FieldArguments, geometryOf, heightsOn } from "./field";

/** Planes of several quantities on a range of dates: `out[q][(t - from) * cells + cell]`. Counts one a date. */
export function fieldPlanesTask(
  args: Omit<FieldArguments, "quantity"> & {
    readonly quantities: readonly string[];
    readonly dates: readonly [number, number];
  },
  job: JobFlags,
): Float32Array[] {
  const geometry = geometryOf(args.record, args.geostrophy);
  const cells = geometry.rows * geometry.columns;
  const [from, to] = args.dates;
  const out = args.quantities.map(() => new Float32Array((to - from) * cells));
  for (let date = from; date < to; date++) {
    job.poll();
    const planes = planesFrom(heightsOn(args, date), geometry);
    args.quantities.forEach((id, q) => {
      out[q].set(planes(id), (date - from) * cells);
    });
    job.count();
  }
  return out;
}
