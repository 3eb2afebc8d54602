import { choleskyFactor, choleskySolve } from "../linear-solve";
import { tricube } from "./loess-line";
import type { PlaneGeometry } from "./spatial";

/** Half-spans of the local fit along each axis, in kilometres. */
export interface LoessSpans {
  readonly eastKilometres: number;
  readonly northKilometres: number;
}

/** 1, x, y, x^2, xy, y^2. */
const terms = 6;
/** Twice the unknowns: fewer points follow their own noise. */
const fewestPoints = 2 * terms;
/** Exponents of x and y of each term. */
const powersX = [0, 1, 0, 2, 1, 0];
const powersY = [0, 0, 1, 0, 1, 2];

/** A source row's tricube weights by column offset -reach … reach, and its offsets in half-spans. */
interface RowWeights {
  readonly source: number;
  readonly y: number;
  readonly reach: number;
  /** Of one column, in half-spans east. */
  readonly stepX: number;
  readonly weights: Float64Array;
}

/**
 * Fits local quadratic surfaces at cells of one row, by weighted least squares over the valid cells of an ellipse. East
 * distances are taken along each source row's own parallel from the asked cell's meridian (sinusoidal projection). Returns
 * the value at a column, NaN where fewer than twelve valid cells weigh or they cannot tell the six terms apart. Of a wave
 * along one axis half the amplitude is left at 1.09 half-spans and half the power at 1.32 (along a line 1.16 and 1.40: a disk
 * weighs its middle more). Ref: Cleveland & Devlin 1988, J. Am. Stat. Assoc. 83, 596 [from memory].
 */
export function surfaceFit(
  plane: Float64Array,
  geometry: PlaneGeometry,
  spans: LoessSpans,
  row: number,
): (column: number) => number {
  const { columns, periodic } = geometry;
  const table = rowTable(geometry, spans, row);
  const sums = new Float64Array(5);
  const valued = new Float64Array(3);
  // Moments of x up to the fourth and y up to the fourth: moments[p * 5 + q] = sum of w x^p y^q.
  const moments = new Float64Array(25);
  const right = new Float64Array(terms);
  const normal = new Float64Array(terms * terms);
  return (column) => {
    moments.fill(0);
    right.fill(0);
    let points = 0;
    for (const each of table) {
      const { weights, reach, stepX } = each;
      const start = each.source * columns;
      const from = periodic ? -reach : Math.max(-reach, -column);
      const to = periodic ? reach : Math.min(reach, columns - 1 - column);
      // Eight running sums in local variables: this loop is where the time goes.
      let s0 = 0;
      let s1 = 0;
      let s2 = 0;
      let s3 = 0;
      let s4 = 0;
      let v0 = 0;
      let v1 = 0;
      let v2 = 0;
      for (let offset = from; offset <= to; offset++) {
        let other = column + offset;
        if (other < 0) other += columns;
        else if (other >= columns) other -= columns;
        const value = plane[start + other];
        if (Number.isNaN(value)) continue;
        points++;
        const x = offset * stepX;
        const w0 = weights[offset + reach];
        const w1 = w0 * x;
        const w2 = w1 * x;
        const w3 = w2 * x;
        s0 += w0;
        s1 += w1;
        s2 += w2;
        s3 += w3;
        s4 += w3 * x;
        v0 += w0 * value;
        v1 += w1 * value;
        v2 += w2 * value;
      }
      sums[0] = s0;
      sums[1] = s1;
      sums[2] = s2;
      sums[3] = s3;
      sums[4] = s4;
      valued[0] = v0;
      valued[1] = v1;
      valued[2] = v2;
      addRow(moments, right, sums, valued, each.y);
    }
    if (points < fewestPoints) return Number.NaN;
    for (let i = 0; i < terms; i++) {
      for (let j = 0; j < terms; j++) {
        normal[i * terms + j] = moments[(powersX[i] + powersX[j]) * 5 + powersY[i] + powersY[j]];
      }
    }
    const factor = choleskyFactor(normal, terms);
    return factor ? choleskySolve(factor, terms, right)[0] : Number.NaN;
  };
}

function addRow(moments: Float64Array, right: Float64Array, sums: Float64Array, valued: Float64Array, y: number): void {
  let power = 1;
  for (let q = 0; q < 5; q++) {
    for (let p = 0; p + q < 5; p++) moments[p * 5 + q] += sums[p] * power;
    power *= y;
  }
  for (let i = 0; i < terms; i++) right[i] += valued[powersX[i]] * y ** powersY[i];
}

function rowTable(geometry: PlaneGeometry, spans: LoessSpans, row: number): RowWeights[] {
  const { rows, columns, northMetres, eastSpacingMetres, periodic } = geometry;
  // Round a turn no cell is taken twice; the cell just opposite an even row is left out.
  const farthest = periodic ? Math.floor((columns - 1) / 2) : columns - 1;
  const table: RowWeights[] = [];
  for (let source = 0; source < rows; source++) {
    const y = (northMetres[source] - northMetres[row]) / (spans.northKilometres * 1000);
    if (Math.abs(y) >= 1) continue;
    const stepX = eastSpacingMetres[source] / (spans.eastKilometres * 1000);
    const reach = Math.min(farthest, Math.ceil(Math.sqrt(1 - y * y) / stepX) - 1);
    const weights = Float64Array.from({ length: 2 * reach + 1 }, (_, i) => tricube(Math.hypot((i - reach) * stepX, y)));
    table.push({ source, y, reach, stepX, weights });
  }
  return table;
}
