import type { FieldChoice, LatitudesResult, OpenStudy } from "../../core/contract/engine";
import type { BandResponse, Plane } from "../../core/model/results";
import { type BandFilter, trustedWeightShare, weightShare } from "../../core/numeric/band-filter";
import { quantityById } from "../../core/ocean/quantities/evaluate";
import { bandFilter, responseAt } from "../../core/study/band";
import type { Background } from "../../core/study/band-plane";
import { colourLimits } from "../../core/study/colour-limits";
import { thinnedDates } from "../../core/study/latitude-time";
import { meanProfile } from "../../core/study/profile";
import type { HeightRecord } from "../../core/study/record";
import type { ReductionTarget } from "../../core/study/reduction";
import type { Study } from "../../core/study/schema";
import type { Job } from "./job";
import type { WorkerPool } from "./pool";
import { zonalSeries } from "./prepared";
import { dateIndexFault } from "./request-faults";
import type { FieldArguments } from "./tasks/field";
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
  readonly filter: BandFilter | null;
}

const noBackground: Background = {
  basis: { names: [], samples: 0, values: new Float64Array(0) },
  coefficients: new Float64Array(0),
};

/** Stages of a study's record, from the workspace. The band is designed, and may be refused, only where it is used. */
export async function fieldStages(
  workspace: Workspace,
  open: OpenStudy,
  grid: string,
  inBand: boolean,
  job: Job,
): Promise<FieldStages> {
  const { record } = await workspace.record(open, grid, job);
  const filter = inBand ? bandFilter(open.study.band, record.time) : null;
  const background = inBand ? await workspace.background(open, grid, job) : noBackground;
  const reduction = await workspace.reduction(open, grid, job);
  return { record, reduction, background, filter };
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
  const stages = await fieldStages(workspace, open, grid, inBand, job);
  const { record, filter, background } = stages;
  const { dates, rows, columns } = record.cube;
  if (!(Number.isInteger(dateIndex) && dateIndex >= 0 && dateIndex < dates)) throw dateIndexFault(dateIndex, dates);
  const field: FieldArguments = {
    record,
    geostrophy: open.study.geostrophy,
    background,
    quantity: choice.quantity,
    inBand,
    filter,
  };
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
    filterEnd: filter ? filterEnds(filter, record.hasData) : new Uint8Array(dates),
    limits,
    pictureLimits: colourLimits([series], quantityById(choice.quantity).signed),
    response: responseOf(open.study, filter, record),
  };
}

/** Latitude–time matrix of a field at the dates asked for: `series[row * at.length + i]`, NaN on dates without data. */
export async function pictureSeries(
  pool: WorkerPool,
  stages: FieldStages,
  field: FieldArguments,
  at: Int32Array,
  job: Job,
): Promise<Float64Array> {
  const { record, reduction, background, filter } = stages;
  const { rows, dates } = record.cube;
  const zonal = zonalSeries(reduction, field.quantity, rows, dates);
  if (!field.inBand) {
    return Float64Array.from({ length: rows * at.length }, (_, i) => {
      return zonal[Math.floor(i / at.length) * dates + at[i % at.length]];
    });
  }
  if (quantityById(field.quantity).linear) {
    const { hasData } = record;
    return pool.run("picture", { zonal, rows, filter, basis: background.basis, hasData, columns: at }, job);
  }
  const parts = await job.step("Filtering map by map", at.length, () =>
    pool.share("zonalBand", at.length, ([from, to]) => ({ ...field, dates: at.subarray(from, to) }), job),
  );
  const byDate = parts.flatMap((part) => Array.from(part));
  return Float64Array.from({ length: rows * at.length }, (_, i) => {
    return byDate[(i % at.length) * rows + Math.floor(i / at.length)];
  });
}

/** 1 on dates whose filtered value rests on less than 90 % of the filter's weight: the record's ends and beside gaps. */
export function filterEnds(filter: BandFilter, hasData: Uint8Array): Uint8Array {
  return Uint8Array.from(weightShare(filter, hasData), (share) => (share < trustedWeightShare ? 1 : 0));
}

function responseOf(study: Study, filter: BandFilter | null, { time, cube }: HeightRecord): BandResponse {
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
    halfWidthSteps: designed?.halfWidth ?? 0,
    daysLostEachEnd: designed ? daysLost(designed, cube.dates, stepDays) : 0,
  };
}

/** Days at each end of a gap-free record of this length whose filtered values are marked. */
function daysLost(filter: BandFilter, dates: number, stepDays: number): number {
  const marked = filterEnds(filter, new Uint8Array(dates).fill(1));
  const firstTrusted = marked.indexOf(0);
  return (firstTrusted < 0 ? dates : firstTrusted) * stepDays;
}

function plane(values: Float64Array, rows: number, columns: number): Plane {
  return { rows, columns, values: Float32Array.from(values) };
}
