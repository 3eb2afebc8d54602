import type { TimeAxis } from "../../core/model/axis";
import { Fault } from "../../core/model/errors";
import type { GridWindow, MaskCounts } from "../../core/model/source";
import { type HeightRecord, surveyValidity } from "../../core/study/record";
import type { Period, Region } from "../../core/study/schema";
import type { GridIndex } from "../readers/joined-grid";
import { selectPeriod, selectRegion } from "../readers/select";
import type { Job } from "./job";
import { requireMemory } from "./memory";
import type { WorkerPool } from "./pool";
import { readRanges } from "./read-ranges";
import { sharedFloat32, sharedFloat64, sharedUint8 } from "./shared-memory";

export interface LoadedRecord {
  readonly record: HeightRecord;
  readonly index: GridIndex;
  readonly coverage: Float64Array;
  readonly masked: MaskCounts;
  /** Where the record lies in the files: its date 0 is the first of `time`. */
  readonly window: GridWindow;
  readonly bytes: number;
}

/**
 * Reads one grid's heights in a region and period into shared memory. Errors: what selection and reading say; Fault
 * "memory" before anything is read; Fault "region" where every cell is missing on every date.
 */
export async function loadRecord(
  index: GridIndex,
  region: Region | undefined,
  period: Period | undefined,
  pool: WorkerPool,
  job: Job,
): Promise<LoadedRecord> {
  const where = `grid ${index.id}`;
  const selected = selectRegion(index, region, `${where}: region`);
  const dates = selectPeriod(index.time, period, `${where}: period`);
  const rows = selected.axes.latitude.values.length;
  const columns = selected.axes.longitude.values.length;
  const length = (dates[1] - dates[0]) * rows * columns;
  const isPlainFloat32 = index.files.every(
    ({ packing, metres }) => packing.type === "float32" && packing.scale === 1 && packing.offset === 0 && metres === 1,
  );
  const bytes = length * (isPlainFloat32 ? 4 : 8);
  requireMemory(bytes, where);
  const values = isPlainFloat32 ? sharedFloat32(length) : sharedFloat64(length);
  markMissingDates(values, index, dates, rows * columns);
  const masked = await job.step(`Reading ${where}`, dates[1] - dates[0], async () => {
    const window = (time: readonly [number, number]): GridWindow => ({
      time,
      latitude: selected.latitude,
      longitude: selected.longitude,
    });
    const reads = readRanges(index, dates, pool.size).map((range) =>
      pool.run("read", { index, window: window(range), firstDate: dates[0], values }, job),
    );
    return addedCounts(await Promise.all(reads));
  });
  const cube = { dates: dates[1] - dates[0], rows, columns, values };
  const { ocean, hasData, complete, irregular, mean, coverage } = surveyValidity(cube);
  if (!hasData.includes(1)) throw nothingValid(where);
  const record = {
    cube,
    axes: selected.axes,
    time: cutTime(index.time, dates),
    ocean: sharedUint8(ocean),
    hasData: sharedUint8(hasData),
    complete: sharedUint8(complete),
    irregular,
    mean,
  };
  const { latitude, longitude } = selected;
  return { record, index, coverage, masked, window: { time: dates, latitude, longitude }, bytes };
}

function markMissingDates(
  values: Float32Array | Float64Array,
  index: GridIndex,
  [from, to]: readonly [number, number],
  cells: number,
): void {
  for (let date = from; date < to; date++) {
    if (index.fileOf[date] < 0) values.fill(Number.NaN, (date - from) * cells, (date - from + 1) * cells);
  }
}

function cutTime(time: TimeAxis, [from, to]: readonly [number, number]): TimeAxis {
  return { ...time, values: time.values.slice(from, to), step: to - from > 1 ? time.step : Number.NaN };
}

function addedCounts(parts: readonly MaskCounts[]): MaskCounts {
  const sum = (rule: keyof MaskCounts) => parts.reduce((total, part) => total + part[rule], 0);
  return { fill: sum("fill"), validRange: sum("validRange"), notFinite: sum("notFinite") };
}

function nothingValid(where: string): Fault {
  return new Fault({
    tag: "region",
    where,
    expected: "at least one ocean cell with a height",
    got: "land or missing values in every cell on every date",
    advice: "choose another region or period",
  });
}
