import type { VelocityPlanes } from "./geostrophy";
import { eastwardDerivative, northwardDerivative } from "./gradients";
import type { GridGeometry } from "./grid-geometry";

/** The four derivatives per metre of u and v, in s-1, without metric terms. Not to be changed by who reads them. */
export interface VelocityGradients {
  readonly uEast: Float64Array;
  readonly uNorth: Float64Array;
  readonly vEast: Float64Array;
  readonly vNorth: Float64Array;
}

/** Each is differenced when it is read, anew every time; NaN rules: see eastwardDerivative. */
export function velocityGradients({ u, v }: VelocityPlanes, geometry: GridGeometry): VelocityGradients {
  return {
    get uEast() {
      return eastwardDerivative(u, geometry);
    },
    get uNorth() {
      return northwardDerivative(u, geometry);
    },
    get vEast() {
      return eastwardDerivative(v, geometry);
    },
    get vNorth() {
      return northwardDerivative(v, geometry);
    },
  };
}
