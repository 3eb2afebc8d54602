/** Heights of a region and period in metres: date-major, then rows (latitude ascending), then columns. NaN where missing. */
export interface Cube {
  readonly dates: number;
  readonly rows: number;
  readonly columns: number;
  /** float64, or float32 where the files store unpacked float32 (nothing is lost by it). */
  readonly values: Float32Array | Float64Array;
}

/** One date's plane as a new float64 array. */
export function planeOf(cube: Cube, date: number): Float64Array {
  const size = cube.rows * cube.columns;
  return Float64Array.from(cube.values.subarray(date * size, (date + 1) * size));
}
