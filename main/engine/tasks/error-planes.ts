import { errorPlanes } from "../../../core/ocean/errors/error-planes";
import { geometryOf } from "../../../core/study/geometry";
import type { HeightRecord } from "../../../core/study/record";
import type { GeostrophySettings } from "../../../core/study/schema";
import type { JobFlags } from "../job";

/** Standard errors of height (m), u, v (m s-1) and vorticity (s-1) on a map that lacks nothing but land. */
export function errorPlanesTask(
  args: {
    readonly record: HeightRecord;
    readonly geostrophy: GeostrophySettings;
    readonly sigmaMetres: number | Float64Array;
    readonly correlationKm: number;
  },
  job: JobFlags,
): {
  readonly height: Float64Array;
  readonly u: Float64Array;
  readonly v: Float64Array;
  readonly vorticity: Float64Array;
} {
  job.poll();
  const { record, sigmaMetres, correlationKm } = args;
  const height = record.mean.map((value, cell) => {
    if (Number.isNaN(value)) return Number.NaN;
    return typeof sigmaMetres === "number" ? sigmaMetres : sigmaMetres[cell];
  });
  const geometry = geometryOf(record.axes, args.geostrophy);
  return { height, ...errorPlanes(record.mean, record.axes, geometry, { sigmaMetres, correlationKm }) };
}
