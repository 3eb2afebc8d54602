/**
 * Least-cost assignment of every row to a column of its own, rows <= columns; `costs[row * columns + column]`, finite.
 * Returns the column of each row. Shortest augmenting paths with potentials, O(rows² columns).
 * Ref: Jonker & Volgenant 1987, Computing 38, 325-340 [from memory].
 */
export function leastCostAssignment(costs: Float64Array, rows: number, columns: number): Int32Array {
  const none = columns;
  const rowPotential = new Float64Array(rows);
  const columnPotential = new Float64Array(columns + 1);
  const rowOf = new Int32Array(columns + 1).fill(-1);
  const previous = new Int32Array(columns);
  for (let start = 0; start < rows; start++) {
    const distance = new Float64Array(columns).fill(Number.POSITIVE_INFINITY);
    const visited = new Uint8Array(columns + 1);
    rowOf[none] = start;
    let column = none;
    while (rowOf[column] >= 0) {
      visited[column] = 1;
      const row = rowOf[column];
      let nearest = none;
      for (let j = 0; j < columns; j++) {
        if (visited[j]) continue;
        const reduced = costs[row * columns + j] - rowPotential[row] - columnPotential[j];
        if (reduced < distance[j]) {
          distance[j] = reduced;
          previous[j] = column;
        }
        if (nearest === none || distance[j] < distance[nearest]) nearest = j;
      }
      const step = distance[nearest];
      for (let j = 0; j <= columns; j++) {
        if (visited[j]) {
          rowPotential[rowOf[j]] += step;
          columnPotential[j] -= step;
        } else if (j < columns) distance[j] -= step;
      }
      column = nearest;
    }
    for (; column !== none; column = previous[column]) rowOf[column] = rowOf[previous[column]];
  }
  const columnOf = new Int32Array(rows);
  for (let j = 0; j < columns; j++) if (rowOf[j] >= 0) columnOf[rowOf[j]] = j;
  return columnOf;
}

/**
 * Least-cost matching in which a row may stay alone at `aloneCost`; Infinity marks pairs that are not allowed. Returns the
 * column of each row, -1 for those left alone.
 */
export function leastCostMatching(costs: Float64Array, rows: number, columns: number, aloneCost: number): Int32Array {
  const width = columns + rows;
  // Dearer than leaving every row alone, yet finite, so that potentials stay numbers.
  const forbidden = (rows + 1) * (aloneCost + 1);
  const widened = new Float64Array(rows * width).fill(aloneCost);
  for (let row = 0; row < rows; row++) {
    for (let column = 0; column < columns; column++) {
      const cost = costs[row * columns + column];
      widened[row * width + column] = Number.isFinite(cost) ? cost : forbidden;
    }
  }
  return leastCostAssignment(widened, rows, width).map((column) => (column < columns ? column : -1));
}
