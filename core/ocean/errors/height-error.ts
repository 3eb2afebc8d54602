import type { GridAxes } from "../../model/axis";
import { Fault } from "../../model/errors";
import { correlatedForm } from "./correlation";
import type { WeightSum } from "./weight-sum";

/** What is known of the heights' error. */
export interface HeightError {
  /** Standard error in metres: one for all cells, or a plane (row-major; NaN where unknown). */
  readonly sigmaMetres: number | Float64Array;
  /**
   * Length L in km of the errors' correlation exp(-d²/2L²), d the distance between two cells; 0 for errors that are
   * independent from cell to cell.
   */
  readonly correlationKm: number;
}

/** Standard error of a weighted sum of heights, in the weights' unit times metres. */
export type ErrorOfSum = (sum: WeightSum) => number;

/**
 * Prepares `sqrt(w' C w)` for weights w and the covariance C = sigma_i sigma_j exp(-d²/2L²) of height errors on a grid. d
 * is the straight distance through the earth: with it C is a covariance for any L, with the arc it need not be (they differ
 * by 0.1 % at 1000 km). A sum that uses a cell without sigma has the error NaN. Throws a Fault (tag "request") for a plane of the
 * wrong size, a negative sigma or length. Ref: propagation of variances, textbook; Gaussian correlation: common practice.
 */
export function errorOfSums(axes: GridAxes, error: HeightError): ErrorOfSum {
  const columns = axes.longitude.values.length;
  const size = axes.latitude.values.length * columns;
  const sigma = sigmaPlane(error.sigmaMetres, size);
  const { correlationKm } = error;
  if (!(correlationKm >= 0)) throw badError("a correlation length of 0 km or more", String(correlationKm));
  if (correlationKm === 0) {
    return ({ count, cells, weights }) => {
      let variance = 0;
      for (let k = 0; k < count; k++) variance += (weights[cells[k]] * sigma[cells[k]]) ** 2;
      return Math.sqrt(variance);
    };
  }
  const form = correlatedForm(axes, correlationKm);
  const amounts = new Float64Array(size);
  return ({ count, cells, weights }) => {
    const ascending = cells.subarray(0, count).sort();
    for (let k = 0; k < count; k++) amounts[k] = weights[ascending[k]] * sigma[ascending[k]];
    // Weights that cancel within rounding can leave a variance just below 0.
    return Math.sqrt(Math.max(form(amounts, ascending, count), 0));
  };
}

function sigmaPlane(sigma: number | Float64Array, size: number): Float64Array {
  const plane = typeof sigma === "number" ? new Float64Array(size).fill(sigma) : sigma;
  if (plane.length !== size) throw badError(`an error at each of ${size} cells`, `${plane.length} values`);
  const negative = plane.find((value) => value < 0);
  if (negative !== undefined) throw badError("standard errors of 0 m or more", `${negative} m`);
  return plane;
}

function badError(expected: string, got: string): Fault {
  return new Fault({ tag: "request", where: "height error", expected, got, advice: "correct the height error" });
}
