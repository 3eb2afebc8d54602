import type { Axis, GridAxes, TimeAxis } from "../../core/model/axis";
import { daysFromDate, formatDay } from "../../core/model/calendar";
import { Fault } from "../../core/model/errors";
import type { Period, Region } from "../../core/study/schema";
import type { Range } from "./read-plan";

export interface SelectedRegion {
  readonly latitude: Range;
  /** Eastward: one range, or two where the region crosses the seam of the files' longitudes. */
  readonly longitude: readonly Range[];
  /** The selected cells' axes; longitudes rise from `region.west` on and never jump. */
  readonly axes: GridAxes;
}

/** Cell centres this close outside an edge count as on it. */
const edgeDegrees = 1e-6;

/**
 * The cells whose centres lie in the region, edges included, from ascending axes. West and east may be given from -180 or from
 * 0, and the region may cross 0, 180 or the files' seam: it runs eastward from west to east. Without a region: all. Throws a Fault (tag
 * "region") with the data's extent for a region without cells, and for one that holds two separate parts of the data.
 */
export function selectRegion(axes: GridAxes, region: Region | undefined, where: string): SelectedRegion {
  if (!region) {
    const { latitude, longitude } = axes;
    return { latitude: [0, latitude.values.length], longitude: [[0, longitude.values.length]], axes };
  }
  const rows = selectRows(axes.latitude, region);
  const width = eastwardWidth(region);
  const columns =
    width === 360 && !axes.longitude.periodic
      ? Array.from(axes.longitude.values, (longitude, index) => ({ index, longitude }))
      : selectColumns(axes.longitude, region.west, width);
  if (!rows || columns.length === 0) throw outside(axes, region, where);
  const ranges: [number, number][] = [];
  for (const { index } of columns) {
    const range = ranges.at(-1);
    if (range && range[1] === index) range[1]++;
    else ranges.push([index, index + 1]);
  }
  const values = Float64Array.from(columns, ({ longitude }) => longitude);
  if (ranges.length > 1) refuseSplit(axes.longitude, ranges, region, where);
  const isWholeTurn = axes.longitude.periodic && columns.length === axes.longitude.values.length;
  return {
    latitude: rows,
    longitude: ranges,
    axes: {
      latitude: {
        ...axes.latitude,
        values: axes.latitude.values.slice(...rows),
        step: stepOf(axes.latitude, rows[1] - rows[0]),
      },
      longitude: { ...axes.longitude, values, step: stepOf(axes.longitude, values.length), periodic: isWholeTurn },
    },
  };
}

function stepOf(axis: Axis, length: number): number {
  return length > 1 ? axis.step : Number.NaN;
}

function selectRows({ values }: Axis, { south, north }: Region): Range | null {
  const from = values.findIndex((value) => value >= south - edgeDegrees);
  const to = values.findLastIndex((value) => value <= north + edgeDegrees) + 1;
  return from >= 0 && to > from ? [from, to] : null;
}

/** 0 < width <= 360: east of west by the way round; equal numbers are a full turn only if they differ by one. */
function eastwardWidth({ west, east }: Region): number {
  const width = east - west;
  if (width >= 360) return 360;
  return width < 0 ? width + 360 * Math.ceil(-width / 360) : width;
}

function selectColumns({ values }: Axis, west: number, width: number): { index: number; longitude: number }[] {
  const found: { index: number; longitude: number; offset: number }[] = [];
  values.forEach((value, index) => {
    let offset = (((value - west) % 360) + 360) % 360;
    if (offset > 360 - edgeDegrees) offset -= 360;
    // A full turn holds each meridian once.
    if (offset > width + edgeDegrees || (width === 360 && offset >= 360 - edgeDegrees)) return;
    found.push({ index, longitude: value + Math.round((west + offset - value) / 360) * 360, offset });
  });
  return found.sort((a, b) => a.offset - b.offset);
}

/** Two ranges are one region only where the files' last cell neighbours the first. */
function refuseSplit(axis: Axis, ranges: readonly Range[], region: Region, where: string): void {
  if (axis.periodic) return;
  const parts = ranges.map(([from, to]) => `${axis.values[from]} to ${axis.values[to - 1]}`).join(" and ");
  throw regionFault(
    where,
    "a region in one piece",
    `${describe(region)}, which holds ${parts}`,
    "choose one of the parts",
  );
}

function outside({ latitude, longitude }: GridAxes, region: Region, where: string): Fault {
  const extent = (axis: Axis) => `${axis.values[0]} to ${axis.values[axis.values.length - 1]}`;
  const expected = `cells within latitude ${extent(latitude)}, longitude ${extent(longitude)}`;
  return regionFault(where, expected, `none in ${describe(region)}`, "choose a region that the data cover");
}

function describe({ west, east, south, north }: Region): string {
  return `west ${west}, east ${east}, south ${south}, north ${north}`;
}

function regionFault(where: string, expected: string, got: string, advice: string): Fault {
  return new Fault({ tag: "region", where, expected, got, advice });
}

/**
 * The dates from the first day of the period to the end of its last day, in the axis's calendar. Without a period: all. Throws a
 * Fault (tag "period") for a day that the calendar does not have and, with the data's extent, for a period without dates.
 */
export function selectPeriod(time: TimeAxis, period: Period | undefined, where: string): Range {
  if (!period) return [0, time.values.length];
  const start = dayOf(time, period.from, `${where}.from`);
  const end = dayOf(time, period.to, `${where}.to`) + 1;
  const from = time.values.findIndex((value) => value >= start);
  const to = time.values.findLastIndex((value) => value < end) + 1;
  if (from >= 0 && to > from) return [from, to];
  const [first, last] = [time.values[0], time.values[time.values.length - 1]].map((day) =>
    formatDay(time.calendar, day),
  );
  const got = `none from ${period.from} to ${period.to}`;
  const advice = "choose a period that the data cover";
  throw new Fault({ tag: "period", where, expected: `dates within ${first} to ${last}`, got, advice });
}

function dayOf({ calendar }: TimeAxis, text: string, where: string): number {
  const [year, month, day] = text.split("-").map(Number);
  try {
    return daysFromDate(calendar, { year, month, day, hour: 0, minute: 0, second: 0 });
  } catch (error) {
    const expected = `a day of the ${calendar} calendar`;
    throw new Fault({ tag: "period", where, expected, got: text, advice: "choose another day" }, { cause: error });
  }
}
