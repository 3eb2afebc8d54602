import type { VelocityPlanes } from "./geostrophy";
import type { GridGeometry } from "./grid-geometry";
import { type VelocityGradients, velocityGradients } from "./velocity-gradients";

/**
 * Divergence in s-1 from u, v in m s-1: du/dx + dv/dy - v tan(latitude)/R, R the transverse radius. For geostrophic flow
 * it is -beta v / f. NaN where u or v is, or where no difference fits. `gradients`, if known, of u and v. The same holds
 * for the strains.
 */
export function divergence(
  velocity: VelocityPlanes,
  geometry: GridGeometry,
  { uEast, vNorth }: VelocityGradients = velocityGradients(velocity, geometry),
): Float64Array {
  return combined(uEast, vNorth, 1, velocity.v, -1, geometry);
}

/** Normal strain in s-1: du/dx - dv/dy - v tan(latitude)/R. Zero for solid rotation of a sphere about any axis. */
export function normalStrain(
  velocity: VelocityPlanes,
  geometry: GridGeometry,
  { uEast, vNorth }: VelocityGradients = velocityGradients(velocity, geometry),
): Float64Array {
  return combined(uEast, vNorth, -1, velocity.v, -1, geometry);
}

/** Shear strain in s-1: dv/dx + du/dy + u tan(latitude)/R. Zero for solid rotation of a sphere about any axis. */
export function shearStrain(
  velocity: VelocityPlanes,
  geometry: GridGeometry,
  { uNorth, vEast }: VelocityGradients = velocityGradients(velocity, geometry),
): Float64Array {
  return combined(vEast, uNorth, 1, velocity.u, 1, geometry);
}

/** east + northSign · north + bendSign · bent · tan(latitude)/R. */
function combined(
  east: Float64Array,
  north: Float64Array,
  northSign: 1 | -1,
  bent: Float64Array,
  bendSign: 1 | -1,
  { rows, columns, convergence }: GridGeometry,
): Float64Array {
  const sum = new Float64Array(east.length);
  for (let row = 0; row < rows; row++) {
    const bend = bendSign * convergence[row];
    for (let i = row * columns; i < (row + 1) * columns; i++) sum[i] = east[i] + northSign * north[i] + bent[i] * bend;
  }
  return sum;
}
