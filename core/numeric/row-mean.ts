/**
 * Weighted mean of the valid cells of one row, summed in float64. NaN where the valid weight is under `leastShare` of the
 * row's ocean weight. `weights` null means equal cells. Ocean cells are those valid on at least one date.
 */
export function rowMean(
  plane: Float64Array,
  offset: number,
  columns: number,
  ocean: Uint8Array,
  weights: Float64Array | null,
  leastShare: number,
): { mean: number; valid: number } {
  let sum = 0;
  let weight = 0;
  let oceanWeight = 0;
  let valid = 0;
  for (let column = 0; column < columns; column++) {
    const width = weights ? weights[column] : 1;
    if (!ocean[offset + column]) continue;
    oceanWeight += width;
    const value = plane[offset + column];
    if (Number.isNaN(value)) continue;
    sum += value * width;
    weight += width;
    valid++;
  }
  const enough = weight > 0 && weight >= leastShare * oceanWeight;
  return { mean: enough ? sum / weight : Number.NaN, valid };
}
