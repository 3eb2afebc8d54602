import { cubicWeights } from "./lattice-weights";
import { type LoessSpans, surfaceFit } from "./loess-fit";
import { FilterRefusal } from "./refusal";
import type { PlaneGeometry } from "./spatial";

export interface SmoothSurface {
  /** The large-scale surface at every valid cell, NaN elsewhere. */
  readonly values: Float64Array;
  /** Cells between neighbouring lattice rows and columns; 1, 1 where every cell was fitted. */
  readonly stride: { readonly rows: number; readonly columns: number };
  /**
   * Largest difference between the interpolated and the fitted surface at the check cells (lattice cell centres, the
   * places farthest from any node), in the plane's units; 0 where every cell was fitted.
   */
  readonly interpolationError: number;
}

/** Lattice nodes a half-span: a wave of one half-span then has eight nodes and loses 0.85 % midway between them. */
const nodesInSpan = 8;
/** At most this many cells are fitted again to measure the interpolation. */
const mostChecks = 64;

/**
 * The large-scale surface of a plane by quadratic tricube loess. Fitted on a lattice of an eighth of each half-span and
 * interpolated by cubics through four nodes along each axis; fitted directly at cells where a node is unknown, or where the
 * lattice would be no coarser than two cells. Subtract it for the small scales (removeLargeScale). Errors (FilterRefusal):
 * half-spans not above zero.
 */
export function loessSurface(plane: Float64Array, geometry: PlaneGeometry, spans: LoessSpans): SmoothSurface {
  const { rows, columns } = geometry;
  for (const span of [spans.eastKilometres, spans.northKilometres]) {
    if (!(span > 0 && Number.isFinite(span))) {
      throw new FilterRefusal("loess", "half-spans above zero", `${span} km`, "choose a half-span in kilometres");
    }
  }
  const stride = latticeStride(geometry, spans);
  const atRow = rowFits(plane, geometry, spans);
  const values = new Float64Array(plane.length).fill(Number.NaN);
  const fitAt = (row: number, column: number) => atRow(row)(column);
  if (stride.rows * stride.columns < 4) {
    for (let cell = 0; cell < plane.length; cell++) {
      if (!Number.isNaN(plane[cell])) values[cell] = fitAt(Math.floor(cell / columns), cell % columns);
    }
    return { values, stride: { rows: 1, columns: 1 }, interpolationError: 0 };
  }
  const nodeRows = nodes(rows, stride.rows, false);
  const nodeColumns = nodes(columns, stride.columns, geometry.periodic);
  const known = Float64Array.from({ length: nodeRows.length * nodeColumns.length }, (_, i) =>
    fitAt(nodeRows[Math.floor(i / nodeColumns.length)], nodeColumns[i % nodeColumns.length]),
  );
  const alongColumns = Array.from({ length: columns }, (_, column) =>
    cubicWeights(nodeColumns, column, geometry.periodic ? columns : null),
  );
  for (let row = 0; row < rows; row++) {
    const along = cubicWeights(nodeRows, row, null);
    for (let column = 0; column < columns; column++) {
      const cell = row * columns + column;
      if (Number.isNaN(plane[cell])) continue;
      const value = combine(known, nodeColumns.length, along, alongColumns[column]);
      values[cell] = Number.isNaN(value) ? fitAt(row, column) : value;
    }
  }
  return { values, stride, interpolationError: largestMiss(plane, values, geometry, nodeRows, nodeColumns, fitAt) };
}

/** The plane less its large-scale surface; NaN where either is unknown. */
export function removeLargeScale(plane: Float64Array, surface: SmoothSurface): Float64Array {
  return plane.map((value, cell) => value - surface.values[cell]);
}

/** A row's fit is made once and kept while that row is asked. */
function rowFits(plane: Float64Array, geometry: PlaneGeometry, spans: LoessSpans) {
  let row = -1;
  let fit: (column: number) => number = () => Number.NaN;
  return (asked: number) => {
    if (asked !== row) fit = surfaceFit(plane, geometry, spans, asked);
    row = asked;
    return fit;
  };
}

function latticeStride({ rows, northMetres, eastSpacingMetres }: PlaneGeometry, spans: LoessSpans) {
  const rowMetres = Math.abs(northMetres[rows - 1] - northMetres[0]) / Math.max(1, rows - 1);
  const widest = eastSpacingMetres.reduce((a, b) => Math.max(a, b), 0);
  const cells = (spanKilometres: number, metres: number) =>
    Math.max(1, Math.floor((spanKilometres * 1000) / (nodesInSpan * metres)) || 1);
  return { rows: cells(spans.northKilometres, rowMetres), columns: cells(spans.eastKilometres, widest) };
}

/** Every stride-th index, and the last one; round a turn the first follows the last. */
function nodes(count: number, stride: number, periodic: boolean): number[] {
  const chosen = Array.from({ length: Math.ceil(count / stride) }, (_, i) => i * stride);
  if (!periodic && chosen[chosen.length - 1] !== count - 1) chosen.push(count - 1);
  return chosen;
}

type Weights = ReturnType<typeof cubicWeights>;

function combine(known: Float64Array, width: number, rows: Weights, columns: Weights): number {
  let sum = 0;
  for (let i = 0; i < rows.nodes.length; i++) {
    for (let j = 0; j < columns.nodes.length; j++) {
      const weight = rows.weights[i] * columns.weights[j];
      if (weight !== 0) sum += weight * known[rows.nodes[i] * width + columns.nodes[j]];
    }
  }
  return sum;
}

function largestMiss(
  plane: Float64Array,
  values: Float64Array,
  { columns }: PlaneGeometry,
  nodeRows: readonly number[],
  nodeColumns: readonly number[],
  fitAt: (row: number, column: number) => number,
): number {
  const centres = nodeRows.slice(1).flatMap((row, i) =>
    nodeColumns.slice(1).map((column, j) => {
      const middle = [row + nodeRows[i], column + nodeColumns[j]].map((sum) => Math.floor(sum / 2));
      return { row: middle[0], column: middle[1] };
    }),
  );
  const valid = centres.filter(({ row, column }) => !Number.isNaN(plane[row * columns + column]));
  const every = Math.max(1, Math.ceil(valid.length / mostChecks));
  let worst = 0;
  for (let i = 0; i < valid.length; i += every) {
    const { row, column } = valid[i];
    const miss = Math.abs(values[row * columns + column] - fitAt(row, column));
    if (miss > worst) worst = miss;
  }
  return worst;
}
