import { fitEddy } from "./eddy-shape";
import type { LocalGrid } from "./local-grid";

/** An eddy seen on one map. */
export interface SeenEddy {
  readonly row: number;
  readonly column: number;
  /** Positive for a hill: height above the level it stands on. */
  readonly amplitudeMetres: number;
  readonly radiusMetres: number;
}

export interface EddySearch {
  /** Lowest hill that counts, metres. */
  readonly leastAmplitudeMetres: number;
  /** How far from a centre its hill is followed at most, metres. */
  readonly farthestMetres: number;
  /** Share of the height variance around a centre that a round Gaussian hill must explain. */
  readonly leastExplained: number;
}

/**
 * 2 cm: under that a hill of a mapped field may be mapping error; half explained: ridges and saddles between
 * eddies are no eddies. Common practice, no source.
 */
export const defaultEddySearch: EddySearch = { leastAmplitudeMetres: 0.02, farthestMetres: 300e3, leastExplained: 0.5 };

export interface EddyCensus {
  readonly eddies: readonly SeenEddy[];
  /** Sea where an eddy's centre could have been seen, km2. */
  readonly searchedKm2: number;
}

/**
 * Eddies of one plane of height anomaly (metres, row-major, NaN for land and gaps), hills and hollows alike, in four steps:
 * zonal means off (a jet's ridge is no eddy); every cell that is higher, or lower, than the 24 around it; from there outward
 * while the mean of ring after ring falls (the outermost monotone radius); a Gaussian hill on a level ground fitted to the
 * cells inside. Kept where the hill, centre to last ring, reaches the least amplitude and the fit explains enough. A cell is
 * searched where the 24 around it are valid. Crowded eddies hide each other: the number found is then too low.
 */
export function findEddies(heightAnomaly: Float64Array, grid: LocalGrid, search: EddySearch): EddyCensus {
  const plane = lessZonalMean(heightAnomaly, grid);
  const { rows, columns } = grid;
  const eddies: SeenEddy[] = [];
  let searchedKm2 = 0;
  for (let row = 2; row < rows - 2; row++) {
    for (let column = 2; column < columns - 2; column++) {
      const kind = extremeAt(plane, row, column, columns);
      if (Number.isNaN(kind)) continue;
      searchedKm2 += grid.cellKm2[row];
      if (kind === 0) continue;
      const fit = fitEddy(plane, grid, { row, column, sign: kind }, search.farthestMetres);
      if (!fit || fit.standsOutMetres < search.leastAmplitudeMetres || fit.explained < search.leastExplained) continue;
      eddies.push({ row, column, amplitudeMetres: kind * fit.amplitudeMetres, radiusMetres: fit.radiusMetres });
    }
  }
  return { eddies, searchedKm2 };
}

/** A plane with each row's mean over its valid cells taken off. */
export function lessZonalMean(plane: Float64Array, { rows, columns }: LocalGrid): Float64Array {
  const out = Float64Array.from(plane);
  for (let row = 0; row < rows; row++) {
    let sum = 0;
    let count = 0;
    for (let i = row * columns; i < (row + 1) * columns; i++) {
      if (Number.isNaN(plane[i])) continue;
      sum += plane[i];
      count++;
    }
    for (let i = row * columns; i < (row + 1) * columns; i++) out[i] -= sum / count;
  }
  return out;
}

/** 1 where the cell tops the 24 around it, -1 where it is under them, 0 where neither, NaN where one is missing. */
function extremeAt(plane: Float64Array, row: number, column: number, columns: number): number {
  const centre = plane[row * columns + column];
  let above = false;
  let below = false;
  for (let down = -2; down <= 2; down++) {
    for (let across = -2; across <= 2; across++) {
      if (down === 0 && across === 0) continue;
      const value = plane[(row + down) * columns + column + across];
      if (Number.isNaN(value) || Number.isNaN(centre)) return Number.NaN;
      if (value >= centre) above = true;
      if (value <= centre) below = true;
    }
  }
  if (above && below) return 0;
  return above ? -1 : 1;
}
