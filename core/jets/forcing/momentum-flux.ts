import { rowMean } from "../../numeric/row-mean";
import type { VelocityPlanes } from "../../ocean/geostrophy";

/** Which rows and columns a plane has, and which cells are ocean (valid on at least one date). */
export interface PlaneShape {
  readonly rows: number;
  readonly columns: number;
  readonly ocean: Uint8Array;
  /** Relative widths of the columns, null for even longitudes. */
  readonly weights: Float64Array | null;
  /** Least share of a row's ocean cells that must be valid. */
  readonly leastShare: number;
}

/**
 * Zonal mean of u'v' in m² s⁻² on one date, one value a row. `from` tells what the primes depart from: "zonal mean" the
 * mean of the same row and date (over cells where both u and v are valid), or planes of the time mean of u and v. NaN
 * where too few cells of the row are valid.
 */
export function eddyMomentumFlux(
  { u, v }: VelocityPlanes,
  from: "zonal mean" | VelocityPlanes,
  shape: PlaneShape,
): Float64Array {
  const uPrime = u.map((value, i) => (Number.isNaN(v[i]) ? Number.NaN : value));
  const vPrime = v.map((value, i) => (Number.isNaN(u[i]) ? Number.NaN : value));
  if (from === "zonal mean") {
    for (const plane of [uPrime, vPrime]) {
      const means = meanByRow(plane, shape);
      for (let i = 0; i < plane.length; i++) plane[i] -= means[Math.floor(i / shape.columns)];
    }
  } else {
    for (let i = 0; i < u.length; i++) {
      uPrime[i] -= from.u[i];
      vPrime[i] -= from.v[i];
    }
  }
  return meanByRow(
    uPrime.map((value, i) => value * vPrime[i]),
    shape,
  );
}

function meanByRow(plane: Float64Array, shape: PlaneShape): Float64Array {
  const { rows, columns, ocean, weights, leastShare } = shape;
  return Float64Array.from(
    { length: rows },
    (_, row) => rowMean(plane, row * columns, columns, ocean, weights, leastShare).mean,
  );
}
