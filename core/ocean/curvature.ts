import { eastwardDerivative, northwardDerivative } from "./gradients";
import type { GridGeometry } from "./grid-geometry";

/**
 * Laplacian of a plane on the curved earth, in the plane's unit per m2: d/dx(d/dx) + d/dy(d/dy) - tan(latitude)/R d/dy,
 * each by two first differences. NaN where the plane is, or where no difference fits.
 */
export function laplacian(plane: Float64Array, geometry: GridGeometry): Float64Array {
  const result = eastwardDerivative(eastwardDerivative(plane, geometry), geometry);
  const slope = northwardDerivative(plane, geometry);
  const bend = northwardDerivative(slope, geometry);
  const { rows, columns, convergence } = geometry;
  for (let row = 0; row < rows; row++) {
    for (let i = row * columns; i < (row + 1) * columns; i++) result[i] += bend[i] - slope[i] * convergence[row];
  }
  return result;
}

/**
 * Meridional gradient of absolute vorticity of a zonal flow u (m s-1), in m-1 s-1:
 * beta - d/dy[(1/(R cos(latitude))) d(u cos(latitude))/d(latitude)] = beta - d/dy[du/dy - u tan(latitude)/R].
 * On a plane it is beta - d2u/dy2; solid rotation U cos(latitude) on a sphere of radius R adds 2 U cos(latitude)/R^2.
 * A change of sign is necessary for barotropic instability (Rayleigh-Kuo). NaN where u is, or where no difference fits.
 */
export function absoluteVorticityGradient(u: Float64Array, geometry: GridGeometry): Float64Array {
  const { rows, columns, convergence, beta } = geometry;
  const shear = northwardDerivative(u, geometry);
  for (let row = 0; row < rows; row++) {
    for (let i = row * columns; i < (row + 1) * columns; i++) shear[i] -= u[i] * convergence[row];
  }
  const gradient = northwardDerivative(shear, geometry);
  for (let row = 0; row < rows; row++) {
    for (let i = row * columns; i < (row + 1) * columns; i++) gradient[i] = beta[row] - gradient[i];
  }
  return gradient;
}
