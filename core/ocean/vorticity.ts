import type { VelocityPlanes } from "./geostrophy";
import type { GridGeometry } from "./grid-geometry";
import { type VelocityGradients, velocityGradients } from "./velocity-gradients";

/**
 * Relative vorticity in s-1 from u, v in m s-1: dv/dx - du/dy + u tan(latitude)/R, R the transverse radius (the curl in the
 * earth's orthogonal coordinates). NaN where u or v is, or where no difference fits. `gradients`, if known, of u and v.
 */
export function relativeVorticity(
  velocity: VelocityPlanes,
  geometry: GridGeometry,
  gradients: VelocityGradients = velocityGradients(velocity, geometry),
): Float64Array {
  const { u } = velocity;
  const { uNorth, vEast } = gradients;
  const { rows, columns, convergence } = geometry;
  const vorticity = new Float64Array(u.length);
  for (let row = 0; row < rows; row++) {
    for (let i = row * columns; i < (row + 1) * columns; i++) {
      vorticity[i] = vEast[i] + (u[i] * convergence[row] - uNorth[i]);
    }
  }
  return vorticity;
}
