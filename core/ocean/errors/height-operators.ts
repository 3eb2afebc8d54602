import { geostrophicVelocity } from "../geostrophy";
import type { GridGeometry } from "../grid-geometry";
import { type TakenDifferences, takeDifferences, visitDifference } from "./difference-weights";
import { slopeWeights, type VisitSlopes } from "./slope-weights";
import { addWeight, type WeightSum } from "./weight-sum";

/** Adds `factor` times the weights that give the value at `cell` from the heights; returns false where the value is NaN. */
export type HeightOperator = (sum: WeightSum, cell: number, factor?: number) => boolean;

export interface HeightOperators {
  readonly u: HeightOperator;
  readonly v: HeightOperator;
  readonly vorticity: HeightOperator;
}

/**
 * Geostrophic velocity (m s-1) and relative vorticity (s-1) as what they are: weighted sums of heights (m). The weights
 * are those actually used at each cell of this plane: narrowed or one-sided beside its gaps and edges, those of the whole
 * column's belt where the equator is blended, and for vorticity the
 * two differences in succession with the metric term u tan(latitude)/R.
 */
export function heightOperators(height: Float64Array, geometry: GridGeometry): HeightOperators {
  const velocity = geostrophicVelocity(height, geometry);
  const heightEast = takeDifferences(height, geometry, "east");
  const heightNorth = takeDifferences(height, geometry, "north");
  const eastOfV = takeDifferences(velocity.v, geometry, "east");
  const northOfU = takeDifferences(velocity.u, geometry, "north");
  const u = velocityOperator(velocity.u, heightNorth, slopeWeights(heightNorth.slopes, geometry, -1));
  const v = velocityOperator(velocity.v, heightEast, slopeWeights(heightEast.slopes, geometry, 1));
  const vorticity: HeightOperator = (sum, cell, factor = 1) => {
    if (eastOfV.widths[cell] === 0 || northOfU.widths[cell] === 0) return false;
    visitDifference(eastOfV, cell, (other, weight) => v(sum, other, factor * weight));
    visitDifference(northOfU, cell, (other, weight) => u(sum, other, -factor * weight));
    return u(sum, cell, factor * geometry.convergence[Math.floor(cell / geometry.columns)]);
  };
  return { u, v, vorticity };
}

function velocityOperator(velocity: Float64Array, taken: TakenDifferences, visitSlopes: VisitSlopes): HeightOperator {
  return (sum, cell, factor = 1) => {
    if (Number.isNaN(velocity[cell])) return false;
    visitSlopes(cell, (at, onSlope) => {
      visitDifference(taken, at, (other, weight) => addWeight(sum, other, factor * onSlope * weight));
    });
    return true;
  };
}
