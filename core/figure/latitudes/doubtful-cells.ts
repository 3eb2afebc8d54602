import type { Plane } from "../../model/results";

/** Standard errors on either side of a value that hold 95 % of normal errors. */
export const errorsWithin95 = 1.96;

/**
 * 1 where a value cannot be told from zero: its magnitude lies under 1.96 of its standard errors. 0 where either is NaN.
 * Row-major like the planes, which have one shape.
 */
export function doubtfulCells(values: Plane, errors: Plane): Uint8Array {
  return Uint8Array.from(values.values, (value, cell) =>
    Math.abs(value) < errorsWithin95 * errors.values[cell] ? 1 : 0,
  );
}
