import { planMeridian } from "../../../core/jets/forcing/meridian";
import type { ForcingResult } from "../../../core/model/scales-result";
import { forcingOf } from "../../../core/study/scales/forcing";
import type { GeostrophySettings } from "../../../core/study/schema";
import type { JobFlags } from "../job";

/** Eddy forcing of the zonal-mean flow; `flow` and `flux` are `values[row * dates + date]`. Counts one. */
export function scaleForcingTask(
  args: {
    readonly flow: Float64Array;
    readonly flux: Float64Array;
    readonly days: Float64Array;
    readonly latitude: Float64Array;
    readonly geostrophy: GeostrophySettings;
  },
  job: JobFlags,
): ForcingResult {
  job.poll();
  const meridian = planMeridian(args.latitude, args.geostrophy.stencil, args.geostrophy);
  const forcing = forcingOf(args.flow, args.flux, args.days, meridian);
  job.count();
  return forcing;
}
