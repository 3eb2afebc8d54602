import type { Drift } from "../../../core/model/scales-result";
import { type BackgroundBasis, removeBackground } from "../../../core/numeric/background";
import type { FrequencyWavenumberSpectrum } from "../../../core/numeric/spectra/frequency-wavenumber";
import { driftOf, type PositionTime } from "../../../core/study/scales/drift-picture";
import { waveSpectrum } from "../../../core/study/scales/wave-picture";
import type { JobFlags } from "../job";

/** Drift and frequency-wavenumber spectrum of a quantity along a latitude after each cell's background is off. */
export function scaleAlongTask(
  args: PositionTime & { readonly basis: BackgroundBasis; readonly even: boolean },
  job: JobFlags,
): { readonly drift: Drift | null; readonly spectrum: FrequencyWavenumberSpectrum | null } {
  job.poll();
  const dates = args.days.length;
  const values = new Float64Array(args.values.length);
  for (let start = 0; start < values.length; start += dates) {
    values.set(removeBackground(args.values.subarray(start, start + dates), args.basis), start);
  }
  const picture = { ...args, values };
  const spectrum = args.even ? waveSpectrum(picture) : null;
  job.poll();
  const drift = driftOf(picture, "row means");
  job.count();
  return { drift, spectrum };
}
