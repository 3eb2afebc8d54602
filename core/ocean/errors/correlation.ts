import type { GridAxes } from "../../model/axis";

/**
 * Radius for distances between errors, whichever earth the study differences on: no correlation length is known to the
 * 0.3 % that the two differ by.
 */
const radiusKm = 6371;
/** On even longitudes the correlations of cells fewer columns apart than this are kept: differences reach no farther. */
const keptColumns = 64;

/** `sum over i, j of a_i a_j rho_ij` for amounts a at the first `count` of `cells`, which must ascend. */
export type QuadraticForm = (amounts: Float64Array, cells: Int32Array, count: number) => number;

/**
 * The quadratic form of the correlation rho = exp(-d²/2L²) between cells of a grid (row-major), d the straight distance through
 * the earth in km. Serves uneven axes as they are; on even longitudes correlations depend on the two rows and the
 * columns between, and are computed once.
 */
export function correlatedForm({ latitude, longitude }: GridAxes, lengthKm: number): QuadraticForm {
  const rows = latitude.values.length;
  const columns = longitude.values.length;
  const radians = (degrees: number) => (degrees * Math.PI) / 180;
  const phi = latitude.values.map(radians);
  const lambda = longitude.values.map(radians);
  const cosine = phi.map(Math.cos);
  // d² = 4 R² times the haversine of the arc.
  const exponent = -(2 * radiusKm ** 2) / lengthKm ** 2;
  const compute = (row: number, otherRow: number, east: number) => {
    const haversine =
      Math.sin((phi[row] - phi[otherRow]) / 2) ** 2 + cosine[row] * cosine[otherRow] * Math.sin(east / 2) ** 2;
    return Math.exp(exponent * haversine);
  };
  const isKept = longitude.even;
  const step = radians(longitude.step);
  const kept: (Float64Array | undefined)[] = new Array(isKept ? rows * rows : 0);
  const correlationsOf = (row: number, otherRow: number) => {
    const known = kept[row * rows + otherRow];
    if (known) return known;
    const length = isKept ? Math.min(columns, keptColumns) : 0;
    const made = Float64Array.from({ length }, (_, apart) => compute(row, otherRow, apart * step));
    if (isKept) kept[row * rows + otherRow] = made;
    return made;
  };

  return (amounts, cells, count) => {
    let total = 0;
    for (let k = 0; k < count; k++) {
      const row = Math.floor(cells[k] / columns);
      const column = cells[k] - row * columns;
      let withEarlier = 0;
      for (let l = 0; l < k; ) {
        const otherRow = Math.floor(cells[l] / columns);
        const start = otherRow * columns;
        const end = start + columns;
        const correlations = correlationsOf(row, otherRow);
        for (; l < k && cells[l] < end; l++) {
          const otherColumn = cells[l] - start;
          const apart = column > otherColumn ? column - otherColumn : otherColumn - column;
          const correlation =
            apart < correlations.length
              ? correlations[apart]
              : compute(row, otherRow, lambda[column] - lambda[otherColumn]);
          withEarlier += amounts[l] * correlation;
        }
      }
      total += amounts[k] * (amounts[k] + 2 * withEarlier);
    }
    return total;
  };
}
