import type { Calendar } from "./calendar";
import { formatDay } from "./calendar";
import { Fault } from "./errors";

export type AxisKind = "latitude" | "longitude" | "time";

/**
 * A coordinate axis. Values are strictly monotonic, finite, in degrees_north, degrees_east (continuous: they never jump
 * by a turn) or days since 1970-01-01T00:00 in the axis's calendar.
 */
export interface Axis {
  readonly kind: AxisKind;
  readonly values: Float64Array;
  /** Signed spacing: (last - first) / (n - 1) where the axis is even, else the median spacing; NaN for one value. */
  readonly step: number;
  /** Every value lies on the straight line from first to last within 1e-6 (degrees or days); see `evenTolerance`. */
  readonly even: boolean;
  /** Longitude only: the axis closes on itself, the last cell neighbours the first. */
  readonly periodic: boolean;
}

export interface TimeAxis extends Axis {
  readonly kind: "time";
  readonly calendar: Calendar;
}

export interface GridAxes {
  readonly latitude: Axis;
  readonly longitude: Axis;
}

const turn = 360;

/**
 * Checks `values` and makes an axis of them. Longitudes are unwrapped so that they never jump by a turn. Ascending and
 * descending are both legal. Throws a Fault (tag "file") that names `where` (file and variable), the first offending
 * index and its values: no value at all, not finite, repeated, not monotonic, a latitude beyond 90 degrees, longitudes
 * over more than a turn.
 */
export function makeAxis(kind: AxisKind, values: ArrayLike<number>, where: string): Axis {
  const asRead = Float64Array.from(values);
  checkValues(kind, asRead, where);
  const checked = kind === "longitude" ? unwrapTurns(asRead) : asRead;
  checkMonotonic(kind, checked, where);
  const { step, even } = spacing(checked, evenTolerance(asRead));
  const span = Math.abs(checked[checked.length - 1] - checked[0]);
  if (kind === "longitude" && span > turn + 1e-4) {
    throw axisFault(where, "longitudes within one turn", `a span of ${span} degrees`, "check the longitude variable");
  }
  const periodic = kind === "longitude" && even && Math.abs(span + Math.abs(step) - turn) <= 1e-3 * Math.abs(step);
  return { kind, values: checked, step, even, periodic };
}

/** As `makeAxis` for days since 1970-01-01T00:00 in `calendar`. */
export function makeTimeAxis(values: ArrayLike<number>, calendar: Calendar, where: string): TimeAxis {
  const days = Float64Array.from(values);
  const shown = (value: number) => (Number.isFinite(value) ? formatDay(calendar, value) : `${value}`);
  checkValues("time", days, where, shown);
  checkMonotonic("time", days, where, shown);
  return { kind: "time", values: days, ...spacing(days, evenTolerance(days)), periodic: false, calendar };
}

/**
 * How far a value may lie from an even axis: 1e-6, or for coordinates stored as float32 two units in the last place of
 * the largest one (a longitude near 360 carries 3e-5 degrees of rounding).
 */
export function evenTolerance(values: Float64Array): number {
  let largest = 0;
  for (const value of values) {
    if (Math.fround(value) !== value) return 1e-6;
    largest = Math.max(largest, Math.abs(value));
  }
  return Math.max(1e-6, 2 * float32Spacing(largest));
}

/** Distance between neighbouring float32 numbers at `magnitude`. */
function float32Spacing(magnitude: number): number {
  return magnitude === 0 ? 0 : 2 ** (Math.floor(Math.log2(magnitude)) - 23);
}

function checkValues(
  kind: AxisKind,
  values: Float64Array,
  where: string,
  shown: (value: number) => string = String,
): void {
  if (values.length === 0) {
    throw axisFault(where, `at least one ${kind}`, "none", "check that the file holds data");
  }
  const wrong = values.findIndex((value) => !Number.isFinite(value) || (kind === "latitude" && Math.abs(value) > 90));
  if (wrong < 0) return;
  const expected = kind === "latitude" ? "latitudes from -90 to 90" : `a finite ${kind} at every index`;
  throw axisFault(where, expected, `${shown(values[wrong])} at index ${wrong}`, "mend or leave out that coordinate");
}

function checkMonotonic(
  kind: AxisKind,
  values: Float64Array,
  where: string,
  shown: (value: number) => string = String,
): void {
  const sign = Math.sign(values[values.length - 1] - values[0]) || 1;
  for (let i = 1; i < values.length; i++) {
    const difference = values[i] - values[i - 1];
    if (Math.sign(difference) === sign) continue;
    const [before, here] = [shown(values[i - 1]), shown(values[i])];
    const got =
      difference === 0
        ? `the same value ${here} at indices ${i - 1} and ${i}`
        : `${before} then ${here} at indices ${i - 1} and ${i}`;
    const expected = `a ${kind} axis that only ${sign > 0 ? "rises" : "falls"}`;
    throw axisFault(where, expected, got, "sort the file along that axis or remove the repeated value");
  }
}

/** A longitude axis that is not monotonic as stored is continued over the jump: 350, 355, 0, 5 becomes 350 … 365. */
function unwrapTurns(values: Float64Array): Float64Array {
  const sign = Math.sign(values[values.length - 1] - values[0]);
  if (sign !== 0 && values.every((value, i) => i === 0 || Math.sign(value - values[i - 1]) === sign)) return values;
  const unwrapped = Float64Array.from(values);
  let shift = 0;
  for (let i = 1; i < values.length; i++) {
    const jump = values[i] - values[i - 1];
    if (Math.abs(jump) > turn / 2) shift -= Math.round(jump / turn) * turn;
    unwrapped[i] = values[i] + shift;
  }
  return unwrapped;
}

function spacing(values: Float64Array, tolerance: number): { step: number; even: boolean } {
  const last = values.length - 1;
  if (last === 0) return { step: Number.NaN, even: true };
  const mean = (values[last] - values[0]) / last;
  if (values.every((value, i) => Math.abs(value - (values[0] + i * mean)) <= tolerance)) {
    return { step: mean, even: true };
  }
  const differences = Float64Array.from({ length: last }, (_, i) => values[i + 1] - values[i]).sort();
  const middle = last >> 1;
  const median = last % 2 ? differences[middle] : (differences[middle - 1] + differences[middle]) / 2;
  return { step: median, even: false };
}

function axisFault(where: string, expected: string, got: string, advice: string): Fault {
  return new Fault({ tag: "file", where, expected, got, advice });
}
