import type { VelocityPlanes } from "./geostrophy";
import type { GridGeometry } from "./grid-geometry";
import { type VelocityGradients, velocityGradients } from "./velocity-gradients";

/** What became of a cell: no value; settled; frozen because its change grew; beyond any balance; still changing. */
export const balance = { none: 0, converged: 1, stoppedGrowing: 2, cannotConverge: 3, unsettled: 4 } as const;

export interface CyclogeostrophySettings {
  /** A cell is settled when its velocity changes by less, in m s-1. Default 0.01. */
  readonly tolerance?: number;
  /** Steps at most. Default 20. */
  readonly mostIterations?: number;
}

/** Settings that iterate until nothing is left but rounding. */
export const iterateFully: CyclogeostrophySettings = { tolerance: 1e-10, mostIterations: 500 };

export interface CyclogeostrophicFlow extends VelocityPlanes {
  /** A value of `balance` a cell. */
  readonly status: Uint8Array;
  readonly iterations: number;
}

/**
 * Velocity in m s-1 that balances pressure, Coriolis force and the acceleration along curved paths, from the geostrophic
 * one by u(n+1) = ug + (1/f) k × (u(n)·grad u(n)), with the earth's metric terms. A cell is frozen at its newest value when
 * that changed by less than the tolerance, or at the last value before its change grew. Anticyclonic curvature 1/r beyond
 * |Vg| = |f| r / 4 allows no balance: such cells carry the value they were frozen at and are marked. On grids finer than
 * about |u|/f a full iteration amplifies grid-scale noise; freezing on growth ends it.
 *
 * NaN where u or v is, where no difference fits, and in the belt at the equator (rows marked blanked), where 1/f does not
 * hold; the last two still serve their neighbours' differences. Ref: Penven, Halo, Pous and Marie 2014, JGR Oceans 119, 1054
 * [from memory].
 */
export function cyclogeostrophicFlow(
  geostrophic: VelocityPlanes,
  geometry: GridGeometry,
  { tolerance = 0.01, mostIterations = 20 }: CyclogeostrophySettings = {},
  gradients: VelocityGradients = velocityGradients(geostrophic, geometry),
): CyclogeostrophicFlow {
  const { rows, columns, coriolis } = geometry;
  const u = geostrophic.u.slice();
  const v = geostrophic.v.slice();
  const first = accelerationOf(geostrophic, geometry, gradients);
  const status = firstStatus(geostrophic, first, geometry, gradients);
  const isFrozen = status.map((each) => (each === balance.none ? 1 : 0));
  const change = new Float64Array(u.length).fill(Number.POSITIVE_INFINITY);
  let moving = isFrozen.reduce((sum, frozen) => sum + 1 - frozen, 0);
  let iterations = 0;
  for (; moving > 0 && iterations < mostIterations; iterations++) {
    const { east, north } =
      iterations === 0 ? first : accelerationOf({ u, v }, geometry, velocityGradients({ u, v }, geometry));
    for (let row = 0; row < rows; row++) {
      for (let i = row * columns; i < (row + 1) * columns; i++) {
        if (isFrozen[i]) continue;
        const nextU = geostrophic.u[i] - north[i] / coriolis[row];
        const nextV = geostrophic.v[i] + east[i] / coriolis[row];
        const moved = Math.hypot(nextU - u[i], nextV - v[i]);
        const grew = !(moved <= change[i]);
        if (!grew) {
          u[i] = nextU;
          v[i] = nextV;
          change[i] = moved;
        }
        if (!grew && moved >= tolerance) continue;
        isFrozen[i] = 1;
        moving--;
        if (status[i] === balance.unsettled) status[i] = grew ? balance.stoppedGrowing : balance.converged;
      }
    }
  }
  for (let i = 0; i < u.length; i++) {
    if (status[i] !== balance.none) continue;
    u[i] = Number.NaN;
    v[i] = Number.NaN;
  }
  return { u, v, status, iterations };
}

/**
 * Speed V of a circular eddy from its geostrophic speed Vg, both positive anticlockwise, radius r in metres: the root of
 * V^2/r + f V = f Vg that goes to Vg with growing radius, V = (r f / 2)(-1 + sqrt(1 + 4 Vg/(f r))). NaN where there is none:
 * anticyclones with |Vg| > |f| r / 4.
 */
export function circularFlowSpeed(geostrophicSpeed: number, radiusMetres: number, coriolis: number): number {
  const half = (radiusMetres * coriolis) / 2;
  return half * (-1 + Math.sqrt(1 + (4 * geostrophicSpeed) / (coriolis * radiusMetres)));
}

/** u·grad u with metric terms, m s-2: east u u_x + v u_y - u v tan/R, north u v_x + v v_y + u^2 tan/R. */
function accelerationOf({ u, v }: VelocityPlanes, geometry: GridGeometry, gradients: VelocityGradients) {
  const { rows, columns, convergence } = geometry;
  const { uEast, uNorth, vEast, vNorth } = gradients;
  const east = new Float64Array(u.length);
  const north = new Float64Array(u.length);
  for (let row = 0; row < rows; row++) {
    for (let i = row * columns; i < (row + 1) * columns; i++) {
      const turning = u[i] * convergence[row];
      east[i] = u[i] * uEast[i] + v[i] * (uNorth[i] - turning);
      north[i] = u[i] * (vEast[i] + turning) + v[i] * vNorth[i];
    }
  }
  return { east, north };
}

/** Below this speed in m s-1 a path has no direction in float64 arithmetic on heights of metres. */
const restSpeed = 1e-7;

/** No value, beyond any balance, or unsettled until the iteration settles it. */
function firstStatus(
  { u, v }: VelocityPlanes,
  { east, north }: { readonly east: Float64Array; readonly north: Float64Array },
  geometry: GridGeometry,
  { uNorth, vEast }: VelocityGradients,
): Uint8Array {
  const { columns, coriolis, convergence, blanked } = geometry;
  return Uint8Array.from(u, (eastward, i) => {
    const row = Math.floor(i / columns);
    if (blanked[row] || Number.isNaN(east[i] + north[i])) return balance.none;
    const squared = eastward * eastward + v[i] * v[i];
    // Vg/r, positive anticlockwise: speed times the path's curvature; at rest its limit in a circular eddy, vorticity / 2.
    const turning =
      squared > restSpeed ** 2
        ? (eastward * north[i] - v[i] * east[i]) / squared
        : (vEast[i] - uNorth[i] + eastward * convergence[row]) / 2;
    return turning / coriolis[row] < -0.25 ? balance.cannotConverge : balance.unsettled;
  });
}
