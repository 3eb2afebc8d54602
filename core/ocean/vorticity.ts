import type { VelocityPlanes } from "./geostrophy";
import { eastwardDerivative, northwardDerivative } from "./gradients";
import type { GridGeometry } from "./grid-geometry";

/**
 * Relative vorticity in s-1 from u, v in m s-1: dv/dx - du/dy + u tan(latitude)/R, R the transverse radius (the curl in the
 * earth's orthogonal coordinates). NaN where u or v is, or where no difference fits.
 */
export function relativeVorticity({ u, v }: VelocityPlanes, geometry: GridGeometry): Float64Array {
  const vorticity = eastwardDerivative(v, geometry);
  const northward = northwardDerivative(u, geometry);
  const { rows, columns, convergence } = geometry;
  for (let row = 0; row < rows; row++) {
    for (let i = row * columns; i < (row + 1) * columns; i++) {
      vorticity[i] += u[i] * convergence[row] - northward[i];
    }
  }
  return vorticity;
}
