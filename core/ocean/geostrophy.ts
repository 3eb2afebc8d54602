import { blendAtEquator } from "./equator";
import { eastwardDerivative, northwardDerivative } from "./gradients";
import type { GridGeometry } from "./grid-geometry";

export interface VelocityPlanes {
  readonly u: Float64Array;
  readonly v: Float64Array;
}

/**
 * Geostrophic velocity in m s-1 from a height plane in metres: u = -(g/f) d(height)/dy, v = (g/f) d(height)/dx.
 * Row-major rows × columns. NaN where the height is, where no difference fits, and in the blanked belt at the equator;
 * with a blend planned the belt at the equator holds blended values instead (see blendAtEquator for its NaN rules).
 */
export function geostrophicVelocity(height: Float64Array, geometry: GridGeometry): VelocityPlanes {
  return {
    u: scaledByGravityOverCoriolis(northwardDerivative(height, geometry), geometry, -1),
    v: scaledByGravityOverCoriolis(eastwardDerivative(height, geometry), geometry, 1),
  };
}

/**
 * Turns a height slope into a velocity in place: times sign × g/f. In the belt at the equator NaN, or with a blend planned
 * the blended value. Returns the same array.
 */
export function scaledByGravityOverCoriolis(slope: Float64Array, geometry: GridGeometry, sign: 1 | -1): Float64Array {
  const { rows, columns, gravity, coriolis, blanked, equatorBlend } = geometry;
  const isBlended = new Set(equatorBlend?.rows);
  if (equatorBlend) blendAtEquator(slope, geometry, equatorBlend, sign);
  for (let row = 0; row < rows; row++) {
    if (isBlended.has(row)) continue;
    const isBlank = blanked[row] && !equatorBlend;
    const factor = isBlank ? Number.NaN : (sign * gravity[row]) / coriolis[row];
    for (let i = row * columns; i < (row + 1) * columns; i++) slope[i] *= factor;
  }
  return slope;
}

/**
 * Velocity across a line between two stations, positive to the left of travel, in m s-1: (1/f) d(geopotential)/ds.
 * Geopotential in m2 s-2 (for heights: gravity times height). Errors: none; infinite at the equator.
 */
export function crossTrackVelocity(
  geopotentialDifference: number,
  distanceMetres: number,
  coriolisParameterAtMiddle: number,
): number {
  return geopotentialDifference / (distanceMetres * coriolisParameterAtMiddle);
}
