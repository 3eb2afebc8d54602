/** Where a point falls in a periodic square and the weights of the 6 × 6 points around it (Lagrange, fifth degree). */
export interface Stencil {
  readonly rows: Int32Array;
  readonly columns: Int32Array;
  readonly rowWeights: Float64Array;
  readonly columnWeights: Float64Array;
}

/** `x` and `y` are fractions of the side; outside 0 to 1 the square repeats. */
export function periodicStencil(x: number, y: number, size: number): Stencil {
  const column = lagrange(x * size, size);
  const row = lagrange(y * size, size);
  return { rows: row.indices, columns: column.indices, rowWeights: row.weights, columnWeights: column.weights };
}

function lagrange(position: number, size: number): { indices: Int32Array; weights: Float64Array } {
  const first = Math.floor(position) - 2;
  const indices = new Int32Array(6);
  const weights = new Float64Array(6);
  for (let i = 0; i < 6; i++) {
    indices[i] = (((first + i) % size) + size) % size;
    let weight = 1;
    for (let j = 0; j < 6; j++) if (j !== i) weight *= (position - first - j) / (i - j);
    weights[i] = weight;
  }
  return { indices, weights };
}

/** Value of a row-major size × size plane under a stencil. */
export function valueUnder(stencil: Stencil, plane: Float64Array, size: number): number {
  let total = 0;
  for (let i = 0; i < 6; i++) {
    const base = stencil.rows[i] * size;
    let along = 0;
    for (let j = 0; j < 6; j++) along += stencil.columnWeights[j] * plane[base + stencil.columns[j]];
    total += stencil.rowWeights[i] * along;
  }
  return total;
}
