import { type DifferencePlan, differentiateLine, planDifferences } from "../../numeric/differences";
import type { StencilPoints } from "../../numeric/stencils";
import {
  type EarthSettings,
  metresPerRadianEast,
  metresPerRadianNorth,
  planetaryVorticityGradient,
} from "../../ocean/earth";

/** A meridian's metric and difference weights; one entry a row. */
export interface Meridian {
  readonly latitude: Float64Array;
  /** Radius of the parallel in metres. */
  readonly parallelRadius: Float64Array;
  /** Metres northward per radian. */
  readonly north: Float64Array;
  readonly beta: Float64Array;
  readonly plan: DifferencePlan;
}

/** Metric of the earth chosen along latitudes in degrees, ascending or descending, at least three, off the poles. */
export function planMeridian(latitude: Float64Array, stencil: StencilPoints, earth: EarthSettings): Meridian {
  const radians = latitude.map((value) => (value * Math.PI) / 180);
  const step = (radians[radians.length - 1] - radians[0]) / (radians.length - 1);
  const even = radians.every((value, i) => Math.abs(value - radians[0] - i * step) < 1e-6 * Math.abs(step));
  return {
    latitude,
    parallelRadius: radians.map((value) => metresPerRadianEast(value, earth)),
    north: radians.map((value) => metresPerRadianNorth(value, earth)),
    beta: latitude.map((value) => planetaryVorticityGradient(value, earth)),
    plan: planDifferences({ coordinates: radians, even, periodic: false, turn: 2 * Math.PI }, stencil),
  };
}

/**
 * Northward derivative per metre of a profile; NaN rows stay NaN and narrow their neighbours' stencils. At ends and beside
 * gaps differences are one-sided, or NaN with `centredOnly`.
 */
export function profileDerivative(profile: Float64Array, meridian: Meridian, centredOnly = false): Float64Array {
  const out = new Float64Array(profile.length);
  const widths = new Int8Array(profile.length);
  differentiateLine(profile, { offset: 0, stride: 1 }, meridian.plan, out, widths);
  return out.map((value, row) => (centredOnly && widths[row] < 0 ? Number.NaN : value / meridian.north[row]));
}

/**
 * Mean of a profile over the area between its first and last latitude, the trapezoidal rule in latitude with the parallels'
 * lengths as weights. Intervals with a NaN end are left out of both sums; NaN where none is left.
 */
export function areaMean(profile: Float64Array, { latitude, parallelRadius, north }: Meridian): number {
  let sum = 0;
  let area = 0;
  for (let row = 1; row < profile.length; row++) {
    if (Number.isNaN(profile[row]) || Number.isNaN(profile[row - 1])) continue;
    const height = Math.abs(latitude[row] - latitude[row - 1]);
    for (const end of [row - 1, row]) {
      const weight = height * parallelRadius[end] * north[end];
      sum += weight * profile[end];
      area += weight;
    }
  }
  return sum / area;
}
