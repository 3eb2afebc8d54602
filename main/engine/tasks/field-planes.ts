import type { JobFlags } from "../job";
import { type FieldArguments, fieldSource } from "./field";

/** Planes of several quantities on a range of dates: `out[q][(t - from) * cells + cell]`. Counts one a date. */
export function fieldPlanesTask(
  args: FieldArguments & {
    readonly quantities: readonly string[];
    readonly dates: readonly [number, number];
  },
  job: JobFlags,
): Float32Array[] {
  const source = fieldSource(args);
  const cells = source.geometry.rows * source.geometry.columns;
  const [from, to] = args.dates;
  const out = args.quantities.map(() => new Float32Array((to - from) * cells));
  for (let date = from; date < to; date++) {
    job.poll();
    const planes = source.on(date);
    args.quantities.forEach((id, q) => {
      out[q].set(planes(id), (date - from) * cells);
    });
    job.count();
  }
  return out;
}
