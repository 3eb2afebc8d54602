import { type GridSpacing, type MapSpectra, mapSpectra } from "../../../core/study/scales/map-spectra";
import type { JobFlags } from "../job";

/** Wavenumber spectra of one pair of planes, such as the time mean of u and v. */
export function scaleMeanTask(
  args: { readonly u: Float64Array; readonly v: Float64Array; readonly spacing: GridSpacing },
  job: JobFlags,
): MapSpectra {
  job.poll();
  return mapSpectra(args.u, args.v, args.spacing);
}
