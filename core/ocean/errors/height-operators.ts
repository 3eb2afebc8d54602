import { geostrophicVelocity } from "../geostrophy";
import type { GridGeometry } from "../grid-geometry";
import { takeDifferences, visitDifference } from "./difference-weights";
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
 * are those actually used at each cell of this plane: narrowed or one-sided beside its gaps and edges, and for vorticity the
 * two differences in succession with the metric term u tan(latitude)/R.
 */
export function heightOperators(height: Float64Array, geometry: GridGeometry): HeightOperators {
  const { columns, gravity, coriolis, convergence } = geometry;
  const velocity = geostrophicVelocity(height, geometry);
  const heightEast = takeDifferences(height, geometry, "east");
  const heightNorth = takeDifferences(height, geometry, "north");
  const eastOfV = takeDifferences(velocity.v, geometry, "east");
  const northOfU = takeDifferences(velocity.u, geometry, "north");
  const rowOf = (cell: number) => Math.floor(cell / columns);

  const u: HeightOperator = (sum, cell, factor = 1) => {
    if (Number.isNaN(velocity.u[cell])) return false;
    const scale = (-factor * gravity[rowOf(cell)]) / coriolis[rowOf(cell)];
    visitDifference(heightNorth, cell, (other, weight) => addWeight(sum, other, scale * weight));
    return true;
  };
  const v: HeightOperator = (sum, cell, factor = 1) => {
    if (Number.isNaN(velocity.v[cell])) return false;
    const scale = (factor * gravity[rowOf(cell)]) / coriolis[rowOf(cell)];
    visitDifference(heightEast, cell, (other, weight) => addWeight(sum, other, scale * weight));
    return true;
  };
  const vorticity: HeightOperator = (sum, cell, factor = 1) => {
    if (eastOfV.widths[cell] === 0 || northOfU.widths[cell] === 0) return false;
    visitDifference(eastOfV, cell, (other, weight) => v(sum, other, factor * weight));
    visitDifference(northOfU, cell, (other, weight) => u(sum, other, -factor * weight));
    return u(sum, cell, factor * convergence[rowOf(cell)]);
  };
  return { u, v, vorticity };
}
