import type { GridAxes } from "../model/axis";
import { stencilPoints } from "../numeric/stencils";
import { geostrophicVelocity, type VelocityPlanes } from "./geostrophy";
import { eastwardDerivative, northwardDerivative } from "./gradients";
import { type GeometrySettings, type GridGeometry, gridGeometry } from "./grid-geometry";
import { type Agreement, addPair, anomalyAgreement, pairMoments, pooledAgreement } from "./pair-moments";

/** How velocity is computed from height: the choices that files seldom state. */
export type Convention = Pick<GeometrySettings, "stencil" | "earth" | "radius" | "gravity">;

/** Every stencil with the ellipsoid and the sphere, gravity by latitude, 9.81 and 9.80665 (CGPM 1901 [from memory]) m s-2. */
export const offeredConventions: readonly Convention[] = stencilPoints.flatMap((stencil) =>
  (["ellipsoid", "sphere"] as const).flatMap((earth) =>
    (["latitude", 9.81, 9.80665] as const).map((gravity) => ({ stencil, earth, radius: 6371000, gravity })),
  ),
);

export interface ConventionAgreement {
  readonly convention: Convention;
  /** Values compared, u and v together. */
  readonly count: number;
  /** Of both components together, m s-1; NaN where nothing is compared. */
  readonly rmsDifference: number;
  /** The same about each cell's mean over the dates; NaN for a single date. */
  readonly rmsAnomalyDifference: number;
  /** Of the supplied components together at the same cells: what the differences are small against, or not. */
  readonly rmsSupplied: number;
}

export interface ConventionSample {
  /** Metres. */
  readonly height: Float64Array;
  /** m s-1. */
  readonly supplied: VelocityPlanes;
}

/**
 * Compares the supplied velocities of a few dates with ours under each candidate convention, the best first: by the difference
 * itself, or with `about: "mean"` (a height anomaly against absolute velocities; two dates or more) by that of the anomalies.
 * All candidates are compared at the same cells: those where the widest stencil is complete in both directions, since
 * nothing tells how the supplied ones were made beside gaps and edges. `settings` gives the rotation rate and the blanked belt. Errors:
 * see gridGeometry.
 */
export function compareConventions(
  samples: readonly ConventionSample[],
  axes: GridAxes,
  settings: Pick<GeometrySettings, "omega" | "equatorDegrees">,
  candidates: readonly Convention[] = offeredConventions,
  about: "zero" | "mean" = "zero",
): ConventionAgreement[] {
  const where = "supplied velocity";
  if (candidates.length === 0) return [];
  const geometries = candidates.map((convention) => gridGeometry(axes, { ...settings, ...convention }, where));
  const widest = geometries.reduce((a, b) => (b.alongRow.halfWidth > a.alongRow.halfWidth ? b : a));
  const complete = samples.map(({ height }) => completeStencilCells(height, widest));
  const agreements = candidates.map((convention, i): ConventionAgreement => {
    const size = geometries[i].rows * geometries[i].columns;
    const moments = { u: pairMoments(size), v: pairMoments(size) };
    samples.forEach(({ height, supplied }, date) => {
      const ours = geostrophicVelocity(height, geometries[i]);
      addPair(moments.u, ours.u, supplied.u, complete[date]);
      addPair(moments.v, ours.v, supplied.v, complete[date]);
    });
    const [all, anomalies] = [pooledAgreement, anomalyAgreement].map((measure) => [
      measure(moments.u, 0, size),
      measure(moments.v, 0, size),
    ]);
    return {
      convention,
      count: all[0].count + all[1].count,
      rmsDifference: rmsOfBoth(all, "rmsDifference"),
      rmsAnomalyDifference: rmsOfBoth(anomalies, "rmsDifference"),
      rmsSupplied: rmsOfBoth(all, "rmsSupplied"),
    };
  });
  const measure = about === "zero" ? "rmsDifference" : "rmsAnomalyDifference";
  return agreements.sort((a, b) => a[measure] - b[measure]);
}

function rmsOfBoth(components: readonly Agreement[], measure: "rmsDifference" | "rmsSupplied"): number {
  const filled = components.filter(({ count }) => count > 0);
  const squares = filled.reduce((sum, each) => sum + each.count * each[measure] ** 2, 0);
  return Math.sqrt(squares / filled.reduce((sum, { count }) => sum + count, 0));
}

/** 1 where the geometry's whole stencil fits eastward and northward, 0 where gaps or edges narrow it. */
function completeStencilCells(height: Float64Array, geometry: GridGeometry): Uint8Array {
  const points = 2 * geometry.alongRow.halfWidth + 1;
  const scratch = new Float64Array(height.length);
  const [east, north] = [new Int8Array(height.length), new Int8Array(height.length)];
  eastwardDerivative(height, geometry, scratch, east);
  northwardDerivative(height, geometry, scratch, north);
  return Uint8Array.from(east, (width, cell) => (width === points && north[cell] === points ? 1 : 0));
}
