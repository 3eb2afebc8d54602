import type { WavenumberSpectrum } from "../../../core/numeric/spectra/wavenumber";
import { type GridSpacing, mapSpectra } from "../../../core/study/scales/map-spectra";
import type { JobFlags } from "../job";
import { type FieldArguments, fieldSource } from "./field";

/** Spectra of some maps, in order of date, and the sum of those whose plane of energy is whole enough. */
export interface MapSpectraPart {
  readonly zonal: readonly WavenumberSpectrum[];
  readonly meridional: readonly WavenumberSpectrum[];
  readonly energy: Float64Array;
  readonly energyMaps: number;
}

/** Wavenumber spectra of the maps on the dates given. Counts one a date. */
export function scaleMapsTask(
  args: FieldArguments & { readonly dates: Int32Array; readonly spacing: GridSpacing },
  job: JobFlags,
): MapSpectraPart {
  const source = fieldSource(args);
  const zonal: WavenumberSpectrum[] = [];
  const meridional: WavenumberSpectrum[] = [];
  const energy = new Float64Array(args.record.cube.rows * args.record.cube.columns);
  let energyMaps = 0;
  for (const date of args.dates) {
    job.poll();
    const planes = source.on(date);
    const map = mapSpectra(planes("u"), planes("v"), args.spacing);
    zonal.push(map.zonal);
    meridional.push(map.meridional);
    if (map.energy) {
      for (let i = 0; i < energy.length; i++) energy[i] += map.energy[i];
      energyMaps++;
    }
    job.count();
  }
  return { zonal, meridional, energy, energyMaps };
}
