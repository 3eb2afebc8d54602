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
  /** Ocean cells that miss some date with data; the others share the record's own gaps. */
  readonly irregular: Int32Array;
  /** Mean over the dates with data, cell by cell; NaN on land. */
  readonly mean: Float64Array;
}

/** Cells valid on at least one date, dates with any and with every ocean cell valid, and each cell's mean in date order. */
export function surveyValidity(
  cube: Cube,
): Pick<HeightRecord, "ocean" | "hasData" | "complete" | "irregular" | "mean"> & { coverage: Float64Array } {
  const cells = cube.rows * cube.columns;
  const ocean = new Uint8Array(cells);
  const valid = new Float64Array(cube.dates);
  const sum = new Float64Array(cells);
  const times = new Int32Array(cells);
  for (let t = 0; t < cube.dates; t++) {
    for (let cell = 0; cell < cells; cell++) {
      const value = cube.values[t * cells + cell];
      if (Number.isNaN(value)) continue;
      ocean[cell] = 1;
      sum[cell] += value;
      times[cell]++;
      valid[t]++;
    }
  }
  const oceanCells = ocean.reduce((sum, value) => sum + value, 0);
  const dated = valid.filter((count) => count > 0).length;
  const irregular: number[] = [];
  times.forEach((count, cell) => {
    if (count > 0 && count < dated) irregular.push(cell);
  });
  return {
    ocean,
    irregular: Int32Array.from(irregular),
    mean: sum.map((total, cell) => (times[cell] > 0 ? total / times[cell] : Number.NaN)),
    hasData: Uint8Array.from(valid, (count) => (count > 0 ? 1 : 0)),
    complete: Uint8Array.from(valid, (count) => (count > 0 && count === oceanCells ? 1 : 0)),
    coverage: valid.map((count) => (oceanCells > 0 ? count / oceanCells : 0)),
  };
}
