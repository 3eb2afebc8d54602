import type { Axis } from "../model/axis";
import { choleskyFactor, choleskySolve } from "../numeric/linear-solve";
import type { EarthSettings } from "./earth";
import { metresPerRadianNorth } from "./earth";
import type { GridGeometry } from "./grid-geometry";

export interface EquatorBlendSettings {
  /** The beta-plane solution's weight is exp(-(latitude / lengthScale)^2). Default 2.2. */
  readonly lengthScaleDegrees?: number;
  /** Half-width of the belt that is fitted and blended. Default 5. */
  readonly widthDegrees?: number;
}

/** What blending needs of a grid: entries of the belt's rows, in the grid's order. */
export interface EquatorBlend {
  readonly rows: Int32Array;
  /** Distance north of the equator over the half-width, -1 to 1. */
  readonly position: Float64Array;
  /** Weight of the beta-plane solution, 1 at the equator. */
  readonly weight: Float64Array;
  /** Half-width in metres. */
  readonly halfWidthMetres: number;
  /** df/dy at the equator in m-1 s-1. */
  readonly beta: number;
}

/** Rows of the grid, and valid slopes of a column, on each side of the equator: the cubic's four unknowns and two over. */
const leastOnEachSide = 3;
/** Least share of the belt's rows with a valid slope, on each side. Common practice, no source. */
const leastShare = 0.5;
/** Unknowns of a cubic. */
const terms = 4;
const degree = Math.PI / 180;

/**
 * Plans the blend for a latitude axis. `blend` is null where it cannot be made, and `reason` then says why in a sentence
 * (empty where no row lies in the belt). Rule: rows must reach both edges of the belt to within one step, with at least
 * three rows on each side of the equator.
 */
export function planEquatorBlend(
  { values, step }: Axis,
  settings: EarthSettings,
  { lengthScaleDegrees = 2.2, widthDegrees = 5 }: EquatorBlendSettings = {},
): { readonly blend: EquatorBlend | null; readonly reason: string } {
  const inBelt = (latitude: number) => Math.abs(latitude) <= widthDegrees + 1e-9;
  const rows = Int32Array.from([...values.keys()].filter((row) => inBelt(values[row])));
  if (rows.length === 0) return { blend: null, reason: "" };
  const latitudes = Float64Array.from(rows, (row) => values[row]);
  const south = latitudes.filter((latitude) => latitude < 0).length;
  const north = latitudes.filter((latitude) => latitude > 0).length;
  const shortfall = widthDegrees - Math.abs(step) - 1e-6;
  const lowest = Math.min(values[0], values[values.length - 1]);
  const highest = Math.max(values[0], values[values.length - 1]);
  if (lowest > -shortfall || highest < shortfall) {
    const span = `from ${lowest} to ${highest} degrees`;
    return {
      blend: null,
      reason: `rows reach ${span}: a blend needs the belt from -${widthDegrees} to ${widthDegrees}`,
    };
  }
  if (south < leastOnEachSide || north < leastOnEachSide) {
    const counts = `${south} rows south and ${north} north of the equator within ${widthDegrees} degrees`;
    return { blend: null, reason: `${counts}: a blend needs ${leastOnEachSide} on each side` };
  }
  const metres = metresPerRadianNorth(0, settings);
  return {
    blend: {
      rows,
      position: latitudes.map((latitude) => latitude / widthDegrees),
      weight: latitudes.map((latitude) => Math.exp(-((latitude / lengthScaleDegrees) ** 2))),
      halfWidthMetres: metres * widthDegrees * degree,
      beta: (2 * settings.omega) / metres,
    },
    reason: "",
  };
}

/**
 * Turns height slopes (per metre, rows × columns) of the belt at the equator into velocities in m s-1, in place: sign × g
 * times W S_b + (1 - W) slope / f. S_b is the beta-plane solution (1/beta)(Z1 + Z2 y + Z3 y^2) from a least-squares cubic
 * Z0 + Z1 y + Z2 y^2 + Z3 y^3 of the column's slopes over the belt; Z0, which no geostrophic flow balances at the equator,
 * is dropped. For northward slopes and sign -1 this gives u = -(g/beta) d2h/dy2 at the equator, for eastward slopes and
 * sign 1 it gives v = (g/beta) d2h/dxdy there.
 *
 * Linear in height for a given pattern of gaps. A cell without a slope stays NaN; a column without three valid slopes
 * and half of the belt's rows on each side of the equator is NaN in the whole belt. Rows outside are not touched.
 * Ref: Lagerloef, Mitchum, Lukas and Niiler 1999, JGR 104, 23313 [weight and dropped constant from memory]; Picaut, Hayes
 * and McPhaden 1989, JGR 94 [from memory].
 */
export function blendAtEquator(slope: Float64Array, geometry: GridGeometry, blend: EquatorBlend, sign: 1 | -1): void {
  const { columns, gravity, coriolis } = geometry;
  const { rows, position, weight, halfWidthMetres, beta } = blend;
  const toVelocity = 1 / (beta * halfWidthMetres);
  for (let column = 0; column < columns; column++) {
    const fit = cubicOfColumn(slope, columns, column, blend);
    for (let k = 0; k < rows.length; k++) {
      const row = rows[k];
      const here = row * columns + column;
      if (Number.isNaN(slope[here])) continue;
      const s = position[k];
      const onBetaPlane = fit ? (fit[1] + (fit[2] + fit[3] * s) * s) * toVelocity : Number.NaN;
      const onLocalPlane = s === 0 ? 0 : ((1 - weight[k]) * slope[here]) / coriolis[row];
      slope[here] = sign * gravity[row] * (weight[k] * onBetaPlane + onLocalPlane);
    }
  }
}

/** 1 for rows whose velocities come for more than a hundredth from the beta-plane solution. */
export function blendedRows({ rows, equatorBlend }: GridGeometry): Uint8Array {
  const marks = new Uint8Array(rows);
  equatorBlend?.rows.forEach((row, k) => {
    if (equatorBlend.weight[k] > 0.01) marks[row] = 1;
  });
  return marks;
}

/** Coefficients of the cubic in position, or null where the column has too few slopes. */
function cubicOfColumn(
  slope: Float64Array,
  columns: number,
  column: number,
  { rows, position }: EquatorBlend,
): Float64Array | null {
  const matrix = new Float64Array(terms * terms);
  const right = new Float64Array(terms);
  const valid = { south: 0, north: 0 };
  const all = { south: 0, north: 0 };
  for (let k = 0; k < rows.length; k++) {
    const s = position[k];
    const value = slope[rows[k] * columns + column];
    const side = s < 0 ? "south" : "north";
    if (s !== 0) all[side]++;
    if (Number.isNaN(value)) continue;
    if (s !== 0) valid[side]++;
    const powers = [1, s, s * s, s * s * s];
    for (let i = 0; i < terms; i++) {
      right[i] += powers[i] * value;
      for (let j = 0; j < terms; j++) matrix[i * terms + j] += powers[i] * powers[j];
    }
  }
  for (const side of ["south", "north"] as const) {
    if (valid[side] < leastOnEachSide || valid[side] < leastShare * all[side]) return null;
  }
  const factor = choleskyFactor(matrix, terms);
  return factor ? choleskySolve(factor, terms, right) : null;
}
