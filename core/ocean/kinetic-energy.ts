import type { VelocityPlanes } from "./geostrophy";

/** (u^2 + v^2)/2 in m2 s-2, cell by cell. NaN where u or v is. */
export function kineticEnergyOf({ u, v }: VelocityPlanes): Float64Array {
  return u.map((value, i) => (value * value + v[i] * v[i]) / 2);
}
