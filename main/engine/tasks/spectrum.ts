import type { SpectrumResult } from "../../../core/model/results";
import type { BackgroundBasis } from "../../../core/numeric/background";
import { quantityById } from "../../../core/ocean/quantities/evaluate";
import { regionSpectrum } from "../../../core/study/period-spectrum";
import type { JobFlags } from "../job";

/** Region-mean spectrum by period of one quantity from its sampled cells. */
export function spectrumTask(
  args: {
    readonly quantity: string;
    readonly samples: Float32Array;
    readonly cellWeights: Float64Array;
    readonly stepDays: number;
    readonly basis: BackgroundBasis;
  },
  job: JobFlags,
): SpectrumResult {
  job.poll();
  return regionSpectrum(quantityById(args.quantity), args.samples, args.cellWeights, args.stepDays, args.basis);
}
