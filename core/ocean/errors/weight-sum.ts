/**
 * A weighted sum over the cells of a plane, kept sparse: `cells[0 … count - 1]` are the cells with a weight, in any order, and
 * `weights[cell]` is each one's. Reused from cell to cell: `clearWeights` costs only what was set.
 */
export interface WeightSum {
  count: number;
  readonly cells: Int32Array;
  readonly weights: Float64Array;
  readonly used: Uint8Array;
}

/** An empty sum for planes of `size` cells. */
export function weightSum(size: number): WeightSum {
  return {
    count: 0,
    cells: new Int32Array(size),
    weights: new Float64Array(size),
    used: new Uint8Array(size),
  };
}

/** Adds to the weight of one cell; a weight of exactly 0 leaves the cell out. */
export function addWeight(sum: WeightSum, cell: number, weight: number): void {
  if (weight === 0) return;
  if (sum.used[cell] === 0) {
    sum.used[cell] = 1;
    sum.cells[sum.count++] = cell;
  }
  sum.weights[cell] += weight;
}

export function clearWeights(sum: WeightSum): void {
  for (let k = 0; k < sum.count; k++) {
    sum.weights[sum.cells[k]] = 0;
    sum.used[sum.cells[k]] = 0;
  }
  sum.count = 0;
}
