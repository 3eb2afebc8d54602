import { type DriftSettings, driftSpeed } from "../../jets/radon/drift-speed";
import type { Drift } from "../../model/scales-result";
import { blockMeans } from "./block-means";

/** Most columns whose lines are summed: the work grows with them. */
const mostColumns = 400;
const resamples = 500;
const seed = 1;

/** Series along a row of positions, `values[position * dates + date]`. */
export interface PositionTime {
  readonly quantity: string;
  readonly values: Float64Array;
  /** Degrees and metres of each position. */
  readonly degrees: Float64Array;
  readonly metres: Float64Array;
  readonly days: Float64Array;
}

/**
 * How the pattern of a position-time picture moves; null where nothing varies. `remove` "row means" asks for what moves
 * alone (waves and eddies along a latitude); "mean" for the whole pattern (jets across latitudes): jets that stand still
 * are then the pattern, whose speed is zero, and not taken off to leave the noise about them as the answer.
 */
export function driftOf(
  { quantity, values, degrees, metres, days }: PositionTime,
  remove: DriftSettings["remove"],
): Drift | null {
  const rows = degrees.length;
  const blocks = blockMeans(values, rows, days, mostColumns);
  const found = driftSpeed(
    { values: blocks.values, positionMetres: metres, days: blocks.days },
    { remove, angleStepDegrees: null, resamples, seed },
  );
  if (Number.isNaN(found.speed)) return null;
  return {
    quantity,
    speed: { value: found.speed, low95: found.low95, high95: found.high95 },
    limits: found.limits,
    share: found.share,
    medianShare: found.medianShare,
    picture: { rows, columns: blocks.days.length, values: Float32Array.from(blocks.values) },
    position: degrees,
    days: blocks.days,
  };
}
