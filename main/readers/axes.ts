import type { Axis } from "../../core/model/axis";
import { makeAxis } from "../../core/model/axis";
import type { Calendar } from "../../core/model/calendar";
import { calendarFromName } from "../../core/model/calendar";
import type { MonthReading } from "../../core/model/time-units";
import { daysFromValue, parseTimeUnits } from "../../core/model/time-units";
import { textAttribute } from "./attributes";
import type { Container, VariableInfo } from "./container";
import { readAll } from "./container";
import { fileFault } from "./faults";
import { noMasked, readPacking, unpack } from "./packing";

/** More values than this along one axis is a damaged header, not data. */
const longestAxis = 20_000_000;

/** A coordinate variable unpacked; fill values are NaN. Out-of-range values stay: only the axis checks judge them. */
export function readCoordinate(container: Container, variable: VariableInfo): Float64Array {
  const where = `${container.path}: ${variable.name}`;
  const length = variable.shape.reduce((product, size) => product * size, 1);
  if (length > longestAxis) {
    throw fileFault(where, `at most ${longestAxis} values`, `${length}`, "check the sizes in the file's header");
  }
  const values = new Float64Array(length);
  const packing = readPacking(variable, where, { applyValidRange: false });
  unpack(readAll(container, variable), packing, 1, noMasked(), values);
  return values;
}

export interface SpatialAxes {
  readonly latitude: Axis;
  readonly longitude: Axis;
  readonly notes: readonly string[];
}

/**
 * Latitude and longitude in the file's own order. A last meridian that repeats the first a turn later is left out, with a
 * note: the axis is then one shorter than the file's dimension.
 */
export function readSpatialAxes(container: Container, latitude: VariableInfo, longitude: VariableInfo): SpatialAxes {
  const longitudes = readCoordinate(container, longitude);
  const where = `${container.path}: ${longitude.name}`;
  let axis = makeAxis("longitude", longitudes, where);
  const notes: string[] = [];
  const last = longitudes.length - 1;
  if (last > 1 && Math.abs(Math.abs(axis.values[last] - axis.values[0]) - 360) < 1e-4) {
    axis = makeAxis("longitude", longitudes.subarray(0, last), where);
    notes.push("the last meridian repeats the first and is left out");
  }
  const latitudeWhere = `${container.path}: ${latitude.name}`;
  return { latitude: makeAxis("latitude", readCoordinate(container, latitude), latitudeWhere), longitude: axis, notes };
}

export interface FileTimes {
  readonly calendar: Calendar;
  readonly units: string;
  /** Days since 1970-01-01T00:00, in the file's order. */
  readonly days: Float64Array;
}

/** The dates of a time variable. NaN where a time is a fill value. */
export function readTimes(container: Container, time: VariableInfo, months: MonthReading = "refuse"): FileTimes {
  const where = `${container.path}: ${time.name}`;
  const text = textAttribute(time.attributes, "units");
  const calendar = calendarFromName(textAttribute(time.attributes, "calendar"), where);
  const units = parseTimeUnits(text, calendar, where, months);
  return { calendar, units: text, days: readCoordinate(container, time).map((value) => daysFromValue(units, value)) };
}
