import type { Calendar } from "./calendar";

export type AxisKind = "latitude" | "longitude" | "time";

/**
 * A coordinate axis. Values are strictly monotonic, finite, in degrees_north, degrees_east (continuous: they never jump
 * by a turn) or days since 1970-01-01T00:00 in the axis's calendar.
 */
export interface Axis {
  readonly kind: AxisKind;
  readonly values: Float64Array;
  /** Signed median spacing; NaN for one value. */
  readonly step: number;
  /** All spacings equal the step within 1e-6 of a degree (float32 coordinates allow 1e-4 of a step). */
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
