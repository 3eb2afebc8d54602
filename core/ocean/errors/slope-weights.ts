import { scaledByGravityOverCoriolis } from "../geostrophy";
import type { GridGeometry } from "../grid-geometry";

/** Hands the height slopes (by cell) that make up the velocity at `cell` to `visit`, with their weights. */
export type VisitSlopes = (cell: number, visit: (cell: number, weight: number) => void) => void;

/**
 * How velocities are made of height slopes (per metre, rows × columns, NaN where there is none): each of its own cell's, times
 * sign × g/f; where the belt at the equator is blended, each of all slopes of its column in the belt. The latter weights are
 * the answers to unit slopes, for the gaps that each column has.
 */
export function slopeWeights(slopes: Float64Array, geometry: GridGeometry, sign: 1 | -1): VisitSlopes {
  const { rows, columns, gravity, coriolis, equatorBlend } = geometry;
  const belt = equatorBlend?.rows ?? new Int32Array(0);
  const isInBelt = new Uint8Array(rows);
  for (const row of belt) isInBelt[row] = 1;
  const answers = new Map<number, Float64Array>();
  const answersOf = (column: number) => {
    const known = answers.get(column);
    if (known) return known;
    const units = new Float64Array(rows * belt.length);
    belt.forEach((row, k) => {
      const hasSlope = !Number.isNaN(slopes[row * columns + column]);
      if (hasSlope) units[row * belt.length + k] = 1;
      else units.fill(Number.NaN, row * belt.length, (row + 1) * belt.length);
    });
    scaledByGravityOverCoriolis(units, { ...geometry, columns: belt.length }, sign);
    answers.set(column, units);
    return units;
  };
  return (cell, visit) => {
    const row = Math.floor(cell / columns);
    const column = cell - row * columns;
    if (isInBelt[row] === 0) {
      visit(cell, (sign * gravity[row]) / coriolis[row]);
      return;
    }
    const weights = answersOf(column);
    for (let k = 0; k < belt.length; k++) {
      const weight = weights[row * belt.length + k];
      if (weight !== 0) visit(belt[k] * columns + column, weight);
    }
  };
}
