import { addToNormal, type BackgroundBasis, removedCoefficients, solveBackground } from "../numeric/background";
import type { HeightRecord } from "./record";

/**
 * Least-squares background of every ocean cell in rows [fromRow, toRow): writes the coefficients of what is taken off (0 for
 * terms that stay) to `out[term * cells + cell]`, cells = rows × columns; NaN for land and for cells that lack the data (see solveBackground).
 *
 * Each cell sees the same sums in the same order whatever the rows a caller asks for, so results do not depend on how the
 * work is shared out. `poll` is called once a date.
 */
export function backgroundPlanes(
  record: HeightRecord,
  basis: BackgroundBasis,
  rows: readonly [from: number, to: number],
  out: Float64Array,
  poll: () => void,
): void {
  const { cube, ocean, hasData, complete } = record;
  const cells = cube.rows * cube.columns;
  const from = rows[0] * cube.columns;
  const count = rows[1] * cube.columns - from;
  const terms = basis.names.length;
  const shared = new Float64Array(terms * terms);
  const corrections = new Map<number, { normal: Float64Array; missing: number }>();
  const right = new Float64Array(terms * count);
  const basisAt = new Float64Array(terms);
  let dates = 0;
  for (let t = 0; t < cube.dates; t++) {
    poll();
    if (!hasData[t]) continue;
    dates++;
    addToNormal(shared, basis, t, 1);
    for (let term = 0; term < terms; term++) basisAt[term] = basis.values[term * basis.samples + t];
    for (let cell = 0; cell < count; cell++) {
      const value = cube.values[t * cells + from + cell];
      if (!complete[t] && ocean[from + cell] && Number.isNaN(value)) {
        let correction = corrections.get(cell);
        if (!correction) {
          correction = { normal: new Float64Array(terms * terms), missing: 0 };
          corrections.set(cell, correction);
        }
        correction.missing++;
        addToNormal(correction.normal, basis, t, -1);
      } else {
        for (let term = 0; term < terms; term++) right[term * count + cell] += basisAt[term] * value;
      }
    }
  }
  const own = new Float64Array(terms);
  for (let cell = 0; cell < count; cell++) {
    const correction = corrections.get(cell);
    const normal = correction ? shared.map((value, i) => value + correction.normal[i]) : shared;
    for (let term = 0; term < terms; term++) own[term] = right[term * count + cell];
    const solved = removedCoefficients(solveBackground(normal, own, dates - (correction?.missing ?? 0)), basis);
    for (let term = 0; term < terms; term++) out[term * cells + from + cell] = solved[term];
  }
}
