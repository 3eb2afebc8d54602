import { differentiateLine } from "../numeric/differences";
import type { GridGeometry } from "./grid-geometry";

/**
 * Eastward derivative per metre of a plane (row-major rows × columns). NaN cells stay NaN and narrow their neighbours'
 * stencils; `widths`, if given, receives the points used (see differentiateLine).
 */
export function eastwardDerivative(
  plane: Float64Array,
  geometry: GridGeometry,
  out: Float64Array = new Float64Array(plane.length),
  widths?: Int8Array,
): Float64Array {
  const { rows, columns, alongRow, east } = geometry;
  for (let row = 0; row < rows; row++) {
    const offset = row * columns;
    differentiateLine(plane, { offset, stride: 1 }, alongRow, out, widths);
    const perMetre = 1 / east[row];
    for (let i = offset; i < offset + columns; i++) out[i] *= perMetre;
  }
  return out;
}

/** Northward derivative per metre of a plane; same rules. Positive northward whichever way the rows run. */
export function northwardDerivative(
  plane: Float64Array,
  geometry: GridGeometry,
  out: Float64Array = new Float64Array(plane.length),
  widths?: Int8Array,
): Float64Array {
  const { rows, columns, alongColumn, north } = geometry;
  for (let column = 0; column < columns; column++) {
    differentiateLine(plane, { offset: column, stride: columns }, alongColumn, out, widths);
  }
  for (let row = 0; row < rows; row++) {
    const perMetre = 1 / north[row];
    for (let i = row * columns; i < (row + 1) * columns; i++) out[i] *= perMetre;
  }
  return out;
}
