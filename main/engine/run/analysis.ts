import type { OpenStudy } from "../../../core/contract/engine";
import { Fault } from "../../../core/model/errors";
import type { Profile, SpectrumResult, SuppliedVelocityReport } from "../../../core/model/results";
import type { ScalesResult } from "../../../core/model/scales-result";
import { quantities } from "../../../core/ocean/quantities/index";
import { meanProfile } from "../../../core/study/profile";
import type { Job } from "../job";
import { type FieldStages, fieldArguments, fieldStages, pictureSeries, type QuantityArguments } from "../latitudes";
import type { LoadedRecord } from "../load-record";
import type { WorkerPool } from "../pool";
import { scalesResult } from "../scales";
import { spectrumResult } from "../spectrum";
import { suppliedVelocity } from "../supplied-velocity";
import type { TaskResult } from "../tasks";
import type { FieldArguments } from "../tasks/field";
import { addMoments, type Moments } from "../tasks/moments";
import type { Workspace } from "../workspace";
import { analyseJets, type JetsAnalysis } from "./jets-analysis";

/** Quantities that a run writes as maps. */
export const mappedQuantities = quantities.filter(({ id }) => ["height", "u", "v", "vorticity"].includes(id));

/** Dates summed at a time; fixed, so that sums do not depend on the number of workers. */
const datesInBlock = 32;

/** A zonal-mean series of u over every date, and its profile. */
export interface ZonalAnalysis {
  /** `series[row * dates + t]`. */
  readonly series: Float64Array;
  readonly profile: Profile;
}

/** All that a run computes, before it is written. */
export interface Analysis {
  readonly open: OpenStudy;
  readonly grid: string;
  readonly loaded: LoadedRecord;
  readonly stages: FieldStages;
  readonly asItStands: ZonalAnalysis;
  readonly moments: Moments;
  /** null for a study without a band. */
  readonly band: { readonly zonal: ZonalAnalysis; readonly moments: Moments } | null;
  readonly jets: JetsAnalysis;
  readonly scales: ScalesResult;
  /** Standard errors from the study's height error; null where it names none. */
  readonly errors: TaskResult<"errorPlanes"> | null;
  /** null where the files supply no velocity. */
  readonly supplied: SuppliedVelocityReport | null;
  /** null where the record is too short or irregular for one. */
  readonly spectrum: SpectrumResult | null;
}

/** Computes what a run writes for the study's first grid. */
export async function analyse(workspace: Workspace, open: OpenStudy, job: Job): Promise<Analysis> {
  const grid = open.study.grids[0].id;
  const hasBand = open.study.band.filter !== "none";
  const stages = await fieldStages(workspace, open, grid, { quantity: "u", inBand: hasBand }, job);
  const loaded = await workspace.record(open, grid, job);
  const raw: QuantityArguments = { ...fieldArguments(stages, open.study, false), quantity: "u" };
  const banded = { ...raw, inBand: true };
  const { pool } = workspace;
  return {
    open,
    grid,
    loaded,
    stages,
    asItStands: await zonalAnalysis(pool, stages, raw, job),
    moments: await momentsOf(pool, raw, "Averaging maps", job),
    band: hasBand
      ? {
          zonal: await zonalAnalysis(pool, stages, banded, job),
          moments: await momentsOf(pool, banded, "Averaging maps in the band", job),
        }
      : null,
    jets: await analyseJets(workspace, open, grid, job),
    scales: await scalesResult(workspace, { open, grid }, job),
    errors: await workspace.errors(open, grid, job),
    supplied: await suppliedVelocity(workspace, open, grid, job),
    spectrum: await spectrumOrNull(workspace, open, grid, job),
  };
}

async function zonalAnalysis(
  pool: WorkerPool,
  stages: FieldStages,
  field: QuantityArguments,
  job: Job,
): Promise<ZonalAnalysis> {
  const { dates, rows } = stages.record.cube;
  const every = Int32Array.from({ length: dates }, (_, t) => t);
  const series = await pictureSeries(pool, stages, field, every, job);
  return { series, profile: meanProfile(series, rows, dates, field.inBand) };
}

async function momentsOf(pool: WorkerPool, field: FieldArguments, step: string, job: Job): Promise<Moments> {
  const { dates } = field.record.cube;
  const ids = mappedQuantities.map(({ id }) => id);
  const blocks = await job.step(step, dates, () =>
    pool.share(
      "moments",
      dates,
      (range) => ({ ...field, quantities: ids, dates: range }),
      job,
      Math.ceil(dates / datesInBlock),
    ),
  );
  return addMoments(blocks);
}

/** Spectrum of u by period; null where the record has too few dates for one. */
async function spectrumOrNull(
  workspace: Workspace,
  open: OpenStudy,
  grid: string,
  job: Job,
): Promise<SpectrumResult | null> {
  try {
    return await spectrumResult(workspace, open, grid, "u", job);
  } catch (error) {
    if (error instanceof Fault && error.tag === "period") return null;
    throw error;
  }
}
