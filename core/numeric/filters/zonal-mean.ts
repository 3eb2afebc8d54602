import { rowMean } from "../row-mean";

/**
 * The plane less each row's mean over its valid cells (equal cells: one parallel). NaN stays NaN. A row whose valid cells
 * are under `leastShare` of its ocean cells is blanked, and so is one with a single valid cell, whose anomaly would be an
 * invented zero. `ocean` null: every cell counts.
 */
export function removeZonalMean(
  plane: Float64Array,
  rows: number,
  columns: number,
  ocean: Uint8Array | null,
  leastShare: number,
): Float64Array {
  const counted = ocean ?? new Uint8Array(plane.length).fill(1);
  const out = new Float64Array(plane.length);
  for (let row = 0; row < rows; row++) {
    const start = row * columns;
    const { mean, valid } = rowMean(plane, start, columns, counted, null, leastShare);
    const taken = valid < 2 ? Number.NaN : mean;
    for (let cell = start; cell < start + columns; cell++) out[cell] = plane[cell] - taken;
  }
  return out;
}
