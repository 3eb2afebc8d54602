import type { Drift } from "../../../core/model/scales-result";
import { driftOf, type PositionTime } from "../../../core/study/scales/drift-picture";
import type { JobFlags } from "../job";

/** Speed of the pattern in a position-time picture, what stands still included; null where there is none. */
export function scaleDriftTask(args: PositionTime, job: JobFlags): Drift | null {
  job.poll();
  const drift = driftOf(args, "mean");
  job.count();
  return drift;
}
