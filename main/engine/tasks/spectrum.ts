import type { TimeAxis } from "../../../core/model/axis";
import type { SpectrumResult } from "../../../core/model/results";
import type { BackgroundBasis } from "../../../core/numeric/background";
import { quantityById } from "../../../core/ocean/quantities/evaluate";
import { regionSpectrum, unevenRegionSpectrum } from "../../../core/study/period-spectrum";
import type { SpectrumSettings } from "../../../core/study/schema";
import type { JobFlags } from "../job";

/** Region-mean spectrum by period of one quantity from its sampled cells: Welch for even dates, Lomb-Scargle for uneven ones. */
export function spectrumTask(
  args: {
    readonly quantity: string;
    readonly samples: Float32Array;
    readonly cellWeights: Float64Array;
    readonly time: TimeAxis;
    readonly basis: BackgroundBasis;
    readonly settings: SpectrumSettings;
  },
  job: JobFlags,
): SpectrumResult {
  job.poll();
  const { samples, cellWeights, time, basis, settings } = args;
  const quantity = quantityById(args.quantity);
  return time.even
    ? regionSpectrum(quantity, samples, cellWeights, time.step, basis, settings)
    : unevenRegionSpectrum(quantity, samples, cellWeights, time.values, basis, settings);
}
