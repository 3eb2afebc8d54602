import type { GridAxes, TimeAxis } from "../model/axis";
import type { Cube } from "../model/cube";

/** A loaded height record: region and period cut out, on a regular time axis where missing dates are present and marked. */
export interface HeightRecord {
  readonly cube: Cube;
  readonly axes: GridAxes;
  readonly time: TimeAxis;
  /** 1 where the cell is valid on at least one date. */
  readonly ocean: Uint8Array;
  /** 1 where the date has at least one valid cell. */
  readonly hasData: Uint8Array;
  /** 1 where every ocean cell is valid: such dates need no look at single cells. */
  readonly complete: Uint8Array;
}

/** Cells valid on at least one date, and dates with any and with every ocean cell valid. */
export function surveyValidity(
  cube: Cube,
): Pick<HeightRecord, "ocean" | "hasData" | "complete"> & { coverage: Float64Array } {
  const cells = cube.rows * cube.columns;
  const ocean = new Uint8Array(cells);
  const valid = new Float64Array(cube.dates);
  for (let t = 0; t < cube.dates; t++) {
    for (let cell = 0; cell < cells; cell++) {
      if (Number.isNaN(cube.values[t * cells + cell])) continue;
      ocean[cell] = 1;
      valid[t]++;
    }
  }
  const oceanCells = ocean.reduce((sum, value) => sum + value, 0);
  return {
    ocean,
    hasData: Uint8Array.from(valid, (count) => (count > 0 ? 1 : 0)),
    complete: Uint8Array.from(valid, (count) => (count > 0 && count === oceanCells ? 1 : 0)),
    coverage: valid.map((count) => (oceanCells > 0 ? count / oceanCells : 0)),
  };
}
