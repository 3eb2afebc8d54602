import type { FieldChoice, LatitudesResult, OpenStudy } from "../../core/contract/engine";
import type { BandResponse, FieldError, Plane } from "../../core/model/results";
import { errorOfZonalMean } from "../../core/ocean/errors/mean-error";
import { quantityById } from "../../core/ocean/quantities/evaluate";
import { responseAt, timeFilter } from "../../core/study/band";
import type { Background } from "../../core/study/band-plane";
import { colourLimits } from "../../core/study/colour-limits";
import { geometryOf } from "../../core/study/geometry";
import { thinnedDates } from "../../core/study/latitude-time";
import { meanProfile } from "../../core/study/profile";
import type { HeightRecord } from "../../core/study/record";
import type { ReductionTarget } from "../../core/study/reduction";
import type { Study } from "../../core/study/schema";
import type { TimeFilter } from "../../core/study/time-filter";
import type { Job } from "./job";
import type { WorkerPool } from "./pool";
import { noBackground } from "./prepared";
import { dateIndexFault } from "./request-faults";
import { type FieldArguments, fieldSettings } from "./tasks/field";
import type { Workspace } from "./workspace";

export interface LatitudesRequest {
  readonly open: OpenStudy;
  readonly grid: string;
  readonly choice: FieldChoice;
  readonly dateIndex: number;
  /** Most columns of the latitude–time picture; dates are thinned evenly beyond. */
  readonly columns: number;
}

/** Everything that a view, a run and their tests need of one field. */
export interface FieldStages {
  readonly record: HeightRecord;
  readonly reduction: ReductionTarget;
  readonly background: Background;
  readonly filter: TimeFilter | null;
}

/** Stages of a study's record, from the workspace. The band is designed, and may be refused, only where it is used. */
export async function fieldStages(
  workspace: Workspace,
  open: OpenStudy,
  grid: string,
  { quantity, inBand }: FieldChoice,
  job: Job,
): Promise<FieldStages> {
  const { record } = await workspace.record(open, grid, job);
  const filter = inBand ? timeFilter(open.study.band, record.time) : null;
  const background = inBand ? await workspace.background(open, grid, job) : noBackground;
  const reduction = await workspace.reduction(open, grid, quantity, job);
  return { record, reduction, background, filter };
}

/** One quantity of a field. */
export type QuantityArguments = FieldArguments & { readonly quantity: string };

/** What the workers need to make fields of these stages. */
export function fieldArguments(stages: FieldStages, study: Study, inBand: boolean): FieldArguments {
  const { record, background } = stages;
  return { record, ...fieldSettings(study), background, inBand };
}

/** What the Latitudes view draws for one field, date and band. */
export async function latitudesResult(
  workspace: Workspace,
  request: LatitudesRequest,
  job: Job,
): Promise<LatitudesResult> {
  const { open, grid, choice, dateIndex } = request;
  const { inBand } = choice;
  quantityById(choice.quantity);
  const stages = await fieldStages(workspace, open, grid, choice, job);
  const { record, filter } = stages;
  const { dates, rows, columns } = record.cube;
  if (!(Number.isInteger(dateIndex) && dateIndex >= 0 && dateIndex < dates)) throw dateIndexFault(dateIndex, dates);
  const field: QuantityArguments = { ...fieldArguments(stages, open.study, inBand), quantity: choice.quantity };
  const columnDates = thinnedDates(dates, request.columns);
  const [{ map, onDate }, limits, series] = await Promise.all([
    workspace.pool.run("map", { ...field, date: dateIndex }, job),
    workspace.pool.run("limits", field, job),
    pictureSeries(workspace.pool, stages, field, columnDates, job),
  ]);
  return {
    choice,
    dateIndex,
    map: plane(map, rows, columns),
    onDate,
    profile: meanProfile(series, rows, columnDates.length, inBand),
    latitudeTime: plane(series, rows, columnDates.length),
    columnDates,
    filterEnd: filter ? filter.ends(record.hasData) : new Uint8Array(dates),
    limits,
    pictureLimits: colourLimits([series], quantityById(choice.quantity)),
    response: responseOf(open.study, filter, record),
    error: await fieldError(workspace, request, stages, { map, onDate }, job),
  };
}

/** Quantities whose error is known, and the plane it comes from. */
const errorSources = {
  height: "height",
  u: "u",
  v: "v",
  vorticity: "vorticity",
  "rossby-number": "vorticity",
} as const;

/** Standard errors of the map and of its zonal means, NaN where they are; null where the study or the quantity has none. */
async function fieldError(
  workspace: Workspace,
  { open, grid, choice, dateIndex }: LatitudesRequest,
  { record, filter }: FieldStages,
  { map, onDate }: { readonly map: Float64Array; readonly onDate: Float64Array },
  job: Job,
): Promise<FieldError | null> {
  const source = errorSources[choice.quantity as keyof typeof errorSources] as
    | (typeof errorSources)["u" | "v" | "height" | "vorticity"]
    | undefined;
  const planes = source ? await workspace.errors(open, grid, job) : null;
  if (!source || !planes) return null;
  const { rows, columns } = record.cube;
  const kept = filter?.row(record.hasData, dateIndex) ?? null;
  const share = choice.inBand && kept ? Math.sqrt(kept.reduce((sum, weight) => sum + weight * weight, 0)) : 1;
  const { coriolis } = geometryOf(record.axes, open.study.geostrophy);
  const scaled = planes[source].map((error, cell) => {
    if (Number.isNaN(map[cell])) return Number.NaN;
    const perF = choice.quantity === "rossby-number" ? Math.abs(coriolis[Math.floor(cell / columns)]) : 1;
    return (share * error) / perF;
  });
  const { standardError } = errorOfZonalMean(scaled, record.axes, open.study.errors.correlationKm);
  const ofMeans = standardError.map((error, row) => (Number.isNaN(onDate[row]) ? Number.NaN : error));
  return { map: plane(scaled, rows, columns), onDate: ofMeans };
}

/** Latitude–time matrix of a field at the dates asked for: `series[row * at.length + i]`, NaN on dates without data. */
export async function pictureSeries(
  pool: WorkerPool,
  stages: FieldStages,
  field: QuantityArguments,
  at: Int32Array,
  job: Job,
): Promise<Float64Array> {
  const { record, reduction, background } = stages;
  const { rows, dates } = record.cube;
  const { zonal } = reduction;
  if (!field.inBand) {
    return Float64Array.from({ length: rows * at.length }, (_, i) => {
      return zonal[Math.floor(i / at.length) * dates + at[i % at.length]];
    });
  }
  if (quantityById(field.quantity).linear) {
    const { time, hasData } = record;
    const { band } = field;
    const parts = await pool.share(
      "picture",
      rows,
      ([from, to]) => ({
        zonal: zonal.subarray(from * dates, to * dates),
        record: { time, hasData },
        rows: to - from,
        band,
        basis: background.basis,
        columns: at,
      }),
      job,
      pool.size,
    );
    return joined(parts);
  }
  const parts = await job.step("Filtering map by map", at.length, () =>
    pool.share("zonalBand", at.length, ([from, to]) => ({ ...field, dates: at.subarray(from, to) }), job),
  );
  const byDate = parts.flatMap((part) => Array.from(part));
  return Float64Array.from({ length: rows * at.length }, (_, i) => {
    return byDate[(i % at.length) * rows + Math.floor(i / at.length)];
  });
}

function joined(parts: readonly Float64Array[]): Float64Array {
  const whole = new Float64Array(parts.reduce((sum, part) => sum + part.length, 0));
  let start = 0;
  for (const part of parts) {
    whole.set(part, start);
    start += part.length;
  }
  return whole;
}

function responseOf(study: Study, filter: TimeFilter | null, { time, cube }: HeightRecord): BandResponse {
  const stepDays = time.step;
  const points = 400;
  const lowest = 1 / (cube.dates * stepDays);
  const highest = 1 / (2 * stepDays);
  const isRegular = cube.dates > 1 && time.even;
  const frequency = isRegular
    ? Float64Array.from({ length: points }, (_, i) => lowest * (highest / lowest) ** (i / (points - 1)))
    : new Float64Array(0);
  const designed = study.band.filter === "none" || !isRegular ? null : filter;
  return {
    frequency,
    amplitude: responseAt(designed, frequency, stepDays),
    halfWidthSteps: designed?.reach ?? 0,
    daysLostEachEnd: designed ? daysLost(designed, cube.dates, stepDays) : 0,
  };
}

/** Days at each end of a gap-free record of this length whose filtered values are marked. */
export function daysLost(filter: TimeFilter, dates: number, stepDays: number): number {
  const marked = filter.ends(new Uint8Array(dates).fill(1));
  const firstTrusted = marked.indexOf(0);
  return (firstTrusted < 0 ? dates : firstTrusted) * stepDays;
}

function plane(values: Float64Array, rows: number, columns: number): Plane {
  return { rows, columns, values: Float32Array.from(values) };
}
