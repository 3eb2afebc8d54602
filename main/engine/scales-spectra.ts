import type { DirectionSpectra, Estimate, WavenumberCurve } from "../../core/model/scales-result";
import { averageSpectra, type WavenumberSpectrum } from "../../core/numeric/spectra/wavenumber";
import { thinnedDates } from "../../core/study/latitude-time";
import { meanPlane } from "../../core/study/scales/flow-speeds";
import type { GridSpacing } from "../../core/study/scales/map-spectra";
import { peakOfDates, peakWavelength } from "../../core/study/scales/peak-wavelength";
import type { Job } from "./job";
import type { WorkerPool } from "./pool";
import type { FieldArguments } from "./tasks/field";
import type { Moments } from "./tasks/moments";
import type { MapSpectraPart } from "./tasks/scale-maps";

/** Pieces that the maps are cut into: fixed, so that sums do not depend on the number of workers. */
const mapPieces = 15;
/** Most maps that are transformed. */
const mostMaps = 60;

/** Spectra of a record's maps in space. */
export interface RecordMapSpectra {
  readonly dates: Int32Array;
  readonly zonal: DirectionSpectra;
  readonly meridional: DirectionSpectra;
  /** Mean plane of kinetic energy; null where no map is whole enough. */
  readonly energy: Float64Array | null;
  /** Meridional wavelength of most variance: each map's, and the time mean's. */
  readonly peak: Estimate;
  readonly meanPeak: number;
}

const unknown: Estimate = { value: Number.NaN, low95: Number.NaN, high95: Number.NaN };
const noSpectra: DirectionSpectra = { eachMap: null, timeMean: null, inBand: null };

export const noMapSpectra: RecordMapSpectra = {
  dates: new Int32Array(0),
  zonal: noSpectra,
  meridional: noSpectra,
  energy: null,
  peak: unknown,
  meanPeak: Number.NaN,
};

/** Spectra of at most 60 maps as they stand, of the time mean, and of as many maps in the band, ends of the filter left out. */
export async function mapSpectraOf(
  pool: WorkerPool,
  plain: FieldArguments,
  banded: FieldArguments | null,
  ends: Uint8Array,
  moments: Moments,
  spacing: GridSpacing,
  job: Job,
): Promise<RecordMapSpectra> {
  const { hasData } = plain.record;
  const dates = mapDates(hasData, new Uint8Array(hasData.length));
  const each = await mapPass(pool, plain, dates, spacing, job);
  const inBand = banded ? await mapPass(pool, banded, mapDates(hasData, ends), spacing, job) : null;
  const mean = await pool.run("scaleMean", { u: meanPlane(moments, 0), v: meanPlane(moments, 1), spacing }, job);
  const along = (direction: "zonal" | "meridional"): DirectionSpectra => ({
    eachMap: curveOf(each[direction]),
    timeMean: curveOf([mean[direction]]),
    inBand: inBand ? curveOf(inBand[direction]) : null,
  });
  const meridional = along("meridional");
  const whole = each.meridional.filter(({ lines }) => lines > 0);
  return {
    dates,
    zonal: along("zonal"),
    meridional,
    energy: each.energyMaps > 0 ? each.energy : null,
    peak:
      whole.length > 0
        ? peakOfDates(
            whole[0].wavenumber,
            whole.map(({ density }) => density),
          )
        : unknown,
    meanPeak: meridional.timeMean
      ? peakWavelength(meridional.timeMean.wavenumber, meridional.timeMean.density)
      : Number.NaN,
  };
}

/** At most 60 dates with data, evenly thinned, those that `avoid` marks left out where enough others are left. */
function mapDates(hasData: Uint8Array, avoid: Uint8Array): Int32Array {
  const dated = Array.from(hasData.keys()).filter((date) => hasData[date]);
  const trusted = dated.filter((date) => !avoid[date]);
  const from = trusted.length >= 8 ? trusted : dated;
  return thinnedDates(from.length, mostMaps).map((i) => from[i]);
}

/** Spectra of the maps on the dates given, parts put together in order. */
async function mapPass(
  pool: WorkerPool,
  field: FieldArguments,
  dates: Int32Array,
  spacing: GridSpacing,
  job: Job,
): Promise<MapSpectraPart> {
  const step = field.inBand ? "Transforming maps in the band" : "Transforming maps";
  const parts = await job.step(step, dates.length, () =>
    pool.share(
      "scaleMaps",
      dates.length,
      ([from, to]) => ({ ...field, dates: dates.slice(from, to), spacing }),
      job,
      mapPieces,
    ),
  );
  const energy = new Float64Array(parts[0].energy.length);
  const energyMaps = parts.reduce((sum, part) => sum + part.energyMaps, 0);
  for (const part of parts) {
    for (let i = 0; i < energy.length; i++) energy[i] += part.energy[i] / energyMaps;
  }
  return {
    zonal: parts.flatMap((part) => part.zonal),
    meridional: parts.flatMap((part) => part.meridional),
    energy,
    energyMaps,
  };
}

/** Mean of some maps' spectra; null where no line of any is whole enough. */
function curveOf(spectra: readonly WavenumberSpectrum[]): WavenumberCurve | null {
  const whole = spectra.filter(({ lines }) => lines > 0);
  if (whole.length === 0) return null;
  const { wavenumber, density } = averageSpectra(whole);
  return { wavenumber, density };
}
