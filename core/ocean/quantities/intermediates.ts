import { cyclogeostrophicFlow } from "../cyclogeostrophy";
import type { VelocityPlanes } from "../geostrophy";
import { eastwardDerivative, northwardDerivative } from "../gradients";
import type { GridGeometry } from "../grid-geometry";
import type { VelocityGradients } from "../velocity-gradients";
import type { PlaneLookup } from "./define";

/**
 * Planes that several quantities share and no menu shows; a lookup computes each once. "cyclogeostrophic-flow" holds u,
 * behind it v, and behind that what became of each cell (see `balance`).
 */
export const intermediates: Readonly<
  Record<string, ((plane: PlaneLookup, geometry: GridGeometry) => Float64Array) | undefined>
> = {
  "u-east": (plane, geometry) => eastwardDerivative(plane("u"), geometry),
  "u-north": (plane, geometry) => northwardDerivative(plane("u"), geometry),
  "v-east": (plane, geometry) => eastwardDerivative(plane("v"), geometry),
  "v-north": (plane, geometry) => northwardDerivative(plane("v"), geometry),
  "cyclogeostrophic-flow": (plane, geometry) => {
    const flow = cyclogeostrophicFlow(velocityFrom(plane), geometry, {}, gradientsFrom(plane));
    const all = new Float64Array(3 * flow.u.length);
    all.set(flow.u);
    all.set(flow.v, flow.u.length);
    all.set(flow.status, 2 * flow.u.length);
    return all;
  },
};

export function velocityFrom(plane: PlaneLookup): VelocityPlanes {
  return { u: plane("u"), v: plane("v") };
}

/** Gradients of u and v, each computed when first read. */
export function gradientsFrom(plane: PlaneLookup): VelocityGradients {
  return {
    get uEast() {
      return plane("u-east");
    },
    get uNorth() {
      return plane("u-north");
    },
    get vEast() {
      return plane("v-east");
    },
    get vNorth() {
      return plane("v-north");
    },
  };
}
