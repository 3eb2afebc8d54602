import { yearLengthDays } from "../../core/model/year-length";
import type { BackgroundBasis } from "../../core/numeric/background";
import { backgroundBasis } from "../../core/numeric/background";
import { quantities } from "../../core/ocean/quantities/index";
import { backgroundFault } from "../../core/study/background-rank";
import type { Background } from "../../core/study/band-plane";
import { chooseSampleCells, type ReductionTarget } from "../../core/study/reduction";
import type { BackgroundSettings, GeostrophySettings } from "../../core/study/schema";
import type { Job } from "./job";
import type { LoadedRecord } from "./load-record";
import type { WorkerPool } from "./pool";
import { sharedFloat32, sharedFloat64 } from "./shared-memory";

/** Cells whose whole series are kept for spectra. */
const sampledCells = 300;

/** Fits the study's background to every cell. Error: Fault "period" where the dates cannot tell its terms apart. */
export async function fitBackgrounds(
  loaded: LoadedRecord,
  settings: BackgroundSettings,
  pool: WorkerPool,
  job: Job,
): Promise<Background> {
  const { record } = loaded;
  const basis: BackgroundBasis = backgroundBasis(record.time.values, settings, yearLengthDays(record.time.calendar));
  const fault = backgroundFault(basis, record);
  if (fault) throw fault;
  const { rows, columns } = record.cube;
  const coefficients = sharedFloat64(basis.names.length * rows * columns);
  await job.step("Fitting mean, trend and seasons", rows, () =>
    pool.share("background", rows, (range) => ({ record, basis, rows: range, coefficients }), job, pool.size),
  );
  return { basis, coefficients };
}

/** Reduces every date to zonal means and sampled cells of every quantity. */
export async function reduceRecord(
  loaded: LoadedRecord,
  geostrophy: GeostrophySettings,
  pool: WorkerPool,
  job: Job,
): Promise<ReductionTarget> {
  const { record } = loaded;
  const { rows, dates } = record.cube;
  const ids = quantities.map((quantity) => quantity.id);
  const sampleCells = chooseSampleCells(record, sampledCells);
  const target: ReductionTarget = {
    quantities: ids,
    zonal: sharedFloat64(ids.length * rows * dates),
    sampleCells,
    samples: sharedFloat32(ids.length * sampleCells.length * dates),
  };
  await job.step("Differencing heights", dates, () =>
    pool.share("reduce", dates, (range) => ({ record, geostrophy, dates: range, target }), job),
  );
  return target;
}

/** Zonal means of one quantity: `series[row * dates + t]`. */
export function zonalSeries(reduction: ReductionTarget, quantity: string, rows: number, dates: number): Float64Array {
  const q = reduction.quantities.indexOf(quantity);
  return reduction.zonal.subarray(q * rows * dates, (q + 1) * rows * dates);
}
