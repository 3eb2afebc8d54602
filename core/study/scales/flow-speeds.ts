/** Sums over dates of u and of v, cell by cell, with the dates that entered. */
export interface VelocitySums {
  readonly sum: readonly Float64Array[];
  readonly squares: readonly Float64Array[];
  readonly count: readonly Int32Array[];
}

/**
 * Root-mean-square speeds of the velocity vector, m s-1: the whole flow, and what departs from each cell's time mean. The
 * latter is over cells with two valid dates or more, NaN without any: one date alone has no mean to depart from.
 */
export interface FlowSpeeds {
  readonly total: number;
  readonly eddy: number;
  readonly totalByRow: Float64Array;
  readonly eddyByRow: Float64Array;
}

/** Mean over dates of component q; NaN where no date is valid. */
export function meanPlane({ sum, count }: VelocitySums, q: number): Float64Array {
  return sum[q].map((value, cell) => value / count[q][cell]);
}

/** Speeds of every row and of the region, cells weighted by the row's length (any unit); NaN where nothing is valid. */
export function flowSpeeds(sums: VelocitySums, rowWeights: Float64Array): FlowSpeeds {
  const rows = rowWeights.length;
  const columns = sums.sum[0].length / rows;
  const totalByRow = new Float64Array(rows);
  const eddyByRow = new Float64Array(rows);
  let [total, eddy, weight, eddyWeight] = [0, 0, 0, 0];
  for (let row = 0; row < rows; row++) {
    let [rowTotal, rowEddy, cells, eddyCells] = [0, 0, 0, 0];
    for (let cell = row * columns; cell < (row + 1) * columns; cell++) {
      if (sums.count[0][cell] === 0 || sums.count[1][cell] === 0) continue;
      cells++;
      const hasEddy = sums.count[0][cell] > 1 && sums.count[1][cell] > 1;
      if (hasEddy) eddyCells++;
      for (const q of [0, 1]) {
        const count = sums.count[q][cell];
        const mean = sums.sum[q][cell] / count;
        const square = sums.squares[q][cell] / count;
        rowTotal += square;
        if (hasEddy) rowEddy += Math.max(0, square - mean * mean);
      }
    }
    totalByRow[row] = Math.sqrt(rowTotal / cells);
    eddyByRow[row] = Math.sqrt(rowEddy / eddyCells);
    total += rowWeights[row] * rowTotal;
    eddy += rowWeights[row] * rowEddy;
    weight += rowWeights[row] * cells;
    eddyWeight += rowWeights[row] * eddyCells;
  }
  return { total: Math.sqrt(total / weight), eddy: Math.sqrt(eddy / eddyWeight), totalByRow, eddyByRow };
}
