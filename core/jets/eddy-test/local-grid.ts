import type { GridAxes } from "../../model/axis";
import type { EarthSettings } from "../../ocean/earth";
import { metresPerDegreeEast, metresPerDegreeNorth } from "./ocean-plan";

/** Distances on a grid, for looking around a cell. */
export interface LocalGrid {
  readonly rows: number;
  readonly columns: number;
  readonly latitudeDegrees: Float64Array;
  readonly longitudeDegrees: Float64Array;
  /** Metres north of the first row, by row. */
  readonly northMetres: Float64Array;
  /** Metres eastward per degree of longitude, by row. */
  readonly eastMetresPerDegree: Float64Array;
  /** The larger side of a cell in the middle row, metres. */
  readonly cellMetres: number;
  /** Area of a cell by row, km2. */
  readonly cellKm2: Float64Array;
}

/** Distances on the grid of the axes; uneven axes are taken as they are, cell areas by the axes' steps. */
export function localGrid({ latitude, longitude }: GridAxes, earth: EarthSettings): LocalGrid {
  const rows = latitude.values.length;
  const north = latitude.values.map((value) => metresPerDegreeNorth(value, earth));
  const east = latitude.values.map((value) => metresPerDegreeEast(value, earth));
  const northMetres = new Float64Array(rows);
  for (let row = 1; row < rows; row++) {
    const step = latitude.values[row] - latitude.values[row - 1];
    northMetres[row] = northMetres[row - 1] + (step * (north[row] + north[row - 1])) / 2;
  }
  const [tall, wide] = [Math.abs(latitude.step), Math.abs(longitude.step)];
  return {
    rows,
    columns: longitude.values.length,
    latitudeDegrees: latitude.values,
    longitudeDegrees: longitude.values,
    northMetres,
    eastMetresPerDegree: east,
    cellMetres: Math.max(tall * north[rows >> 1], wide * east[rows >> 1]),
    cellKm2: east.map((metres, row) => (tall * north[row] * wide * metres) / 1e6),
  };
}
