import { statSync } from "node:fs";
import type { Axis } from "../../core/model/axis";
import type { Calendar } from "../../core/model/calendar";
import { Fault } from "../../core/model/errors";
import type { GridFileReport } from "../../core/model/source";
import type { MonthReading } from "../../core/model/time-units";
import { textAttribute } from "./attributes";
import { readSpatialAxes, readTimes } from "./axes";
import type { Container, NumericArray, VariableInfo } from "./container";
import { fileFault } from "./faults";
import { joinTimes } from "./join-times";
import type { GridLayout } from "./layout";
import { gridLayout } from "./layout";
import type { Packing } from "./packing";
import { noMasked, readPacking, unpack } from "./packing";
import type { Recognised } from "./recognise";
import { metresPerUnit } from "./units";

/** What the person may decide about reading a file. */
export interface ReadChoices {
  /** How to read "months since" and "years since"; default "refuse". */
  readonly months?: MonthReading;
  /** Whether valid ranges mask; default true. */
  readonly applyValidRange?: boolean;
}

/** Everything needed to read heights from one file again without scanning it. Plain data. */
export interface GridFilePlan {
  readonly path: string;
  readonly bytes: number;
  readonly modifiedMs: number;
  readonly height: string;
  readonly shape: readonly number[];
  readonly chunks: readonly number[] | null;
  readonly layout: GridLayout;
  readonly packing: Packing;
  /** Metres in one of the file's unit. */
  readonly metres: number;
  readonly rows: number;
  readonly columns: number;
  /** Stored from north to south, from east to west. */
  readonly descending: { readonly latitude: boolean; readonly longitude: boolean };
}

export interface GridFileContents {
  readonly plan: GridFilePlan;
  /** Ascending, whatever the file's order. */
  readonly latitude: Axis;
  readonly longitude: Axis;
  readonly calendar: Calendar;
  readonly timeUnits: string;
  readonly days: Float64Array;
  readonly notes: readonly string[];
}

/** A map of more cells than this is refused before memory is asked for. */
const largestPlane = 200_000_000;

/**
 * Reads what is needed to join the file with others: axes, dates, packing. Throws a Fault (tag "file") for a height that is
 * no length or a date for every map that is not there, and (tag "memory") for maps of more than 2e8 cells.
 */
export function readGridFile(
  container: Container,
  recognised: Recognised,
  choices: ReadChoices = {},
): GridFileContents {
  const { height } = recognised;
  const where = `${container.path}: ${height.name}`;
  const layout = gridLayout(container.path, recognised);
  refuseHugePlane(height.shape[layout.latitude] * height.shape[layout.longitude], where);
  const axes = readSpatialAxes(container, recognised.latitude, recognised.longitude);
  checkSameLength(height.shape[layout.latitude], recognised.latitude, where);
  checkSameLength(height.shape[layout.longitude], recognised.longitude, where);
  const { calendar, units, days: allDays } = readTimes(container, recognised.time, choices.months);
  const notes = [...recognised.notes, ...axes.notes];
  const maps = layout.time === null ? 1 : height.shape[layout.time];
  if (maps === 0) throw fileFault(where, "at least one map", "none", "choose another file");
  if (maps < allDays.length)
    notes.push(`${height.name} has maps for the first ${maps} of ${allDays.length} dates only`);
  const days = allDays.subarray(0, maps);
  const packing = readPacking(height, where, choices);
  const fileUnits = textAttribute(height.attributes, "units");
  const metres = fileUnits === "" ? 1 : metresPerUnit(fileUnits);
  if (metres === null) {
    throw fileFault(
      where,
      "a height in metres, centimetres or millimetres",
      `units "${fileUnits}"`,
      "choose another variable",
    );
  }
  if (fileUnits === "") notes.push(`${height.name} has no units: taken as metres`);
  const plan: GridFilePlan = {
    path: container.path,
    bytes: container.bytes,
    modifiedMs: statSync(container.path).mtimeMs,
    height: height.name,
    shape: height.shape,
    chunks: height.chunks,
    layout,
    packing,
    metres,
    rows: axes.latitude.values.length,
    columns: axes.longitude.values.length,
    descending: { latitude: isDescending(axes.latitude), longitude: isDescending(axes.longitude) },
  };
  return {
    plan,
    latitude: ascending(axes.latitude),
    longitude: ascending(axes.longitude),
    calendar,
    timeUnits: units,
    days,
    notes: [...notes, ...packing.notes.map((note) => `${height.name}: ${note}`)],
  };
}

/** What was recognised in a gridded file, with the masked cells of its first date. */
export function describeGridFile(
  container: Container,
  recognised: Recognised,
  choices: ReadChoices = {},
): GridFileReport {
  const { height } = recognised;
  const contents = readGridFile(container, recognised, choices);
  const { plan, latitude, longitude, calendar, timeUnits, days } = contents;
  const times = joinTimes([{ path: container.path, days }], calendar);
  const first = readFirstDate(container, plan);
  const masked = noMasked();
  unpack(first, plan.packing, plan.metres, masked, new Float64Array(first.length));
  return {
    kind: "grid",
    path: container.path,
    format: container.format,
    title: textAttribute(container.attributes, "title"),
    height: {
      name: height.name,
      standardName: textAttribute(height.attributes, "standard_name"),
      longName: textAttribute(height.attributes, "long_name"),
      fileUnits: textAttribute(height.attributes, "units"),
      foundBy: recognised.foundBy,
      reference: recognised.reference,
      storedAs: storedAs(plan.packing),
    },
    latitude,
    longitude,
    time: times.axis,
    timeDeviationDays: times.deviationDays,
    timeUnits,
    masked,
    bytes: container.bytes,
    notes: [...contents.notes, ...times.notes],
  };
}

function readFirstDate(container: Container, plan: GridFilePlan): NumericArray {
  const isMap = (i: number) => i === plan.layout.latitude || i === plan.layout.longitude;
  return container.read(
    plan.height,
    plan.shape.map(() => 0),
    plan.shape.map((length, i) => (isMap(i) ? length : 1)),
  );
}

/** "int16 × 0.0001", "int16 × 0.0001 + 0.5", "float32". */
export function storedAs({ type, scale, offset }: Packing): string {
  const scaled = scale === 1 ? "" : ` × ${scale}`;
  return `${type}${scaled}${offset === 0 ? "" : ` + ${offset}`}`;
}

/** Only plain HDF5 and unlimited dimensions can break this. */
function checkSameLength(length: number, coordinate: VariableInfo, where: string): void {
  if (coordinate.shape[0] === length) return;
  const got = `${coordinate.shape[0]} values of ${coordinate.name}`;
  throw fileFault(where, `${length} values along ${coordinate.dimensions[0]}`, got, "mend the coordinate variable");
}

function refuseHugePlane(cells: number, where: string): void {
  if (cells <= largestPlane) return;
  throw new Fault({
    tag: "memory",
    where,
    expected: `maps of at most ${largestPlane.toExponential(0)} cells`,
    got: `${cells} cells`,
    advice: "check the sizes in the file's header, or cut the file to a region",
  });
}

function isDescending({ values }: Axis): boolean {
  return values[values.length - 1] < values[0];
}

function ascending(axis: Axis): Axis {
  return isDescending(axis) ? { ...axis, values: axis.values.toReversed(), step: -axis.step } : axis;
}
