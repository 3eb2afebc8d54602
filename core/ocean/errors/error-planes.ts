import type { GridAxes } from "../../model/axis";
import type { GridGeometry } from "../grid-geometry";
import { errorOfSums, type HeightError } from "./height-error";
import { type HeightOperator, heightOperators } from "./height-operators";
import { clearWeights, weightSum } from "./weight-sum";

/** Standard errors, row-major rows × columns: u and v in m s-1, vorticity in s-1. */
export interface ErrorPlanes {
  readonly u: Float64Array;
  readonly v: Float64Array;
  readonly vorticity: Float64Array;
}

/**
 * Standard errors of geostrophic velocity and relative vorticity from the error of the heights (m) they are computed from:
 * exact propagation through the weights used at each cell, for the geometry's stencil, earth and axes. NaN where the value
 * itself is NaN (gaps, no difference, blanked belt) or a height it uses has no error. What the mapping smoothed away is
 * no part of it. Errors: see errorOfSums.
 */
export function errorPlanes(
  height: Float64Array,
  axes: GridAxes,
  geometry: GridGeometry,
  error: HeightError,
): ErrorPlanes {
  const operators = heightOperators(height, geometry);
  const errorOf = errorOfSums(axes, error);
  const sum = weightSum(height.length);
  const plane = (operator: HeightOperator) => {
    const out = new Float64Array(height.length).fill(Number.NaN);
    for (let cell = 0; cell < out.length; cell++) {
      if (operator(sum, cell)) out[cell] = errorOf(sum);
      clearWeights(sum);
    }
    return out;
  };
  return { u: plane(operators.u), v: plane(operators.v), vorticity: plane(operators.vorticity) };
}
