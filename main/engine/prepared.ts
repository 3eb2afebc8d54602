import { yearLengthDays } from "../../core/model/year-length";
import type { BackgroundBasis } from "../../core/numeric/background";
import { backgroundBasis } from "../../core/numeric/background";
import { quantityById } from "../../core/ocean/quantities/evaluate";
import { backgroundFault } from "../../core/study/background-rank";
import type { Background } from "../../core/study/band-plane";
import { chooseSampleCells, type ReductionTarget } from "../../core/study/reduction";
import type { BackgroundSettings, Study } from "../../core/study/schema";
import type { Job } from "./job";
import type { LoadedRecord } from "./load-record";
import type { WorkerPool } from "./pool";
import { sharedFloat32, sharedFloat64 } from "./shared-memory";
import { type FieldArguments, fieldSettings } from "./tasks/field";

/** Stands where fields are taken as they stand. */
export const noBackground: Background = {
  basis: { names: [], removed: new Uint8Array(0), samples: 0, values: new Float64Array(0) },
  coefficients: new Float64Array(0),
};

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

/** Reduces every date to zonal means and sampled cells of one quantity. */
export async function reduceRecord(
  loaded: LoadedRecord,
  study: Study,
  quantity: string,
  pool: WorkerPool,
  job: Job,
): Promise<ReductionTarget> {
  const { record } = loaded;
  const { rows, dates } = record.cube;
  const sampleCells = chooseSampleCells(record, sampledCells);
  const target: ReductionTarget = {
    quantity,
    zonal: sharedFloat64(rows * dates),
    sampleCells,
    samples: sharedFloat32(sampleCells.length * dates),
  };
  const field: FieldArguments = { record, ...fieldSettings(study), background: noBackground, inBand: false };
  await job.step(`Taking zonal means of ${quantityById(quantity).title.toLowerCase()}`, dates, () =>
    pool.share("reduce", dates, (range) => ({ ...field, dates: range, target }), job),
  );
  return target;
}
