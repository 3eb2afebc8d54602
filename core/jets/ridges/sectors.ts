import { rowMean } from "../../numeric/row-mean";

/** Longitudes cut into sectors of equal width. */
export interface Sectors {
  /** Middle longitude of each, degrees east. */
  readonly middle: Float64Array;
  /** First column of each, and one past the last column of the last. */
  readonly firstColumn: Int32Array;
}

/**
 * Cuts ascending longitudes into the whole number of equal sectors whose width comes nearest to `widthDegrees` (one at
 * least, never more than there are columns). A column belongs to the sector that holds its centre.
 */
export function cutSectors(longitude: Float64Array, widthDegrees: number): Sectors {
  const columns = longitude.length;
  const cell = columns > 1 ? (longitude[columns - 1] - longitude[0]) / (columns - 1) : widthDegrees;
  const west = longitude[0] - cell / 2;
  const span = longitude[columns - 1] + cell / 2 - west;
  const count = Math.min(columns, Math.max(1, Math.round(span / widthDegrees)));
  const width = span / count;
  const firstColumn = new Int32Array(count + 1).fill(columns);
  for (let column = columns - 1; column >= 0; column--) {
    const sector = Math.min(count - 1, Math.floor((longitude[column] - west) / width + 1e-9));
    for (let s = sector; s >= 0 && firstColumn[s] > column; s--) firstColumn[s] = column;
  }
  return { middle: Float64Array.from({ length: count }, (_, s) => west + (s + 0.5) * width), firstColumn };
}

/**
 * Means of one plane over each sector, `out[sector * rows + row]`: a profile over latitude for each. NaN where under
 * `leastShare` of the sector's ocean cells in that row are valid. `ocean` marks the cells valid on at least one date.
 */
export function sectorMeans(
  plane: Float64Array,
  rows: number,
  ocean: Uint8Array,
  sectors: Sectors,
  leastShare: number,
): Float64Array {
  const columns = plane.length / rows;
  const count = sectors.middle.length;
  const out = new Float64Array(count * rows);
  for (let sector = 0; sector < count; sector++) {
    const first = sectors.firstColumn[sector];
    const width = sectors.firstColumn[sector + 1] - first;
    for (let row = 0; row < rows; row++) {
      out[sector * rows + row] = rowMean(plane, row * columns + first, width, ocean, null, leastShare).mean;
    }
  }
  return out;
}
