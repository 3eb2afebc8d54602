import { choleskyFactor, choleskySolve } from "../linear-solve";

/** What is taken off before a transform: nothing, the mean, or the least-squares line (for a plane, the fitted plane). */
export type Detrend = "none" | "constant" | "linear";

/** A copy with its mean or its least-squares line taken off. NaN anywhere makes all NaN (but for "none"). */
export function detrended(series: Float64Array, how: Detrend): Float64Array {
  if (how === "none") return series.slice();
  const count = series.length;
  let mean = 0;
  for (const value of series) mean += value;
  mean /= count;
  if (how === "constant") return series.map((value) => value - mean);
  const middle = (count - 1) / 2;
  let slope = 0;
  let scale = 0;
  for (let i = 0; i < count; i++) {
    slope += (i - middle) * (series[i] - mean);
    scale += (i - middle) * (i - middle);
  }
  slope = scale > 0 ? slope / scale : 0;
  return series.map((value, i) => value - mean - slope * (i - middle));
}

/**
 * A copy of a row-major plane with its mean, or the plane a + b row + c column fitted to the valid cells by least squares,
 * taken off. NaN cells stay NaN and take no part. All NaN where the valid cells cannot tell the three terms apart.
 */
export function detrendedPlane(plane: Float64Array, rows: number, columns: number, how: Detrend): Float64Array {
  if (how === "none") return plane.slice();
  const terms = how === "constant" ? 1 : 3;
  const basis = (cell: number): number[] => [
    1,
    Math.floor(cell / columns) / rows - 0.5,
    (cell % columns) / columns - 0.5,
  ];
  const normal = new Float64Array(terms * terms);
  const right = new Float64Array(terms);
  for (let cell = 0; cell < plane.length; cell++) {
    if (Number.isNaN(plane[cell])) continue;
    const values = basis(cell);
    for (let i = 0; i < terms; i++) {
      right[i] += values[i] * plane[cell];
      for (let j = 0; j < terms; j++) normal[i * terms + j] += values[i] * values[j];
    }
  }
  const factor = choleskyFactor(normal, terms);
  if (!factor) return new Float64Array(plane.length).fill(Number.NaN);
  const fit = choleskySolve(factor, terms, right);
  return plane.map((value, cell) => {
    const values = basis(cell);
    let fitted = 0;
    for (let i = 0; i < terms; i++) fitted += fit[i] * values[i];
    return value - fitted;
  });
}
