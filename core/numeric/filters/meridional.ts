import { leastWeightShare } from "../band-filter";
import {
  bandKernels,
  checkResolved,
  type DistanceKernel,
  type FilteredPlane,
  kernelAt,
  type PlaneGeometry,
  type WavelengthBand,
} from "./spatial";

/**
 * Lanczos filter along each column for wavelengths in kilometres along the meridian. Rows may lie unevenly: a row weighs
 * with its width. Gap-aware: each low-pass is a weighted mean over the column's valid cells, NaN where less than a quarter
 * of its weight lies on data; a constant stays constant. Beyond the first and last row counts as missing. Errors
 * (FilterRefusal): fewer than two rows, a bad band, a shortest wavelength under two cells of the widest rows.
 */
export function filterMeridional(plane: Float64Array, geometry: PlaneGeometry, band: WavelengthBand): FilteredPlane {
  const kernels = bandKernels(band);
  const lattice = extendedRows(geometry.northMetres, (kernels.slow ?? kernels.fast)?.reachMetres ?? 0);
  checkResolved(kernels.fast, lattice.widestMetres, "along a column");
  const fast = kernels.fast ? lowPassColumns(plane, geometry, lattice, kernels.fast) : { values: plane, share: null };
  const slow = kernels.slow ? lowPassColumns(plane, geometry, lattice, kernels.slow) : null;
  const values = slow ? fast.values.map((value, cell) => value - slow.values[cell]) : Float64Array.from(fast.values);
  const share = Float64Array.from(plane, (_, cell) => Math.min(fast.share?.[cell] ?? 1, slow?.share[cell] ?? 1));
  return { values, share };
}

/** Rows with as many imagined ones beyond each end as the filter reaches, so that whole weights are known at the ends. */
interface RowLattice {
  readonly positions: Float64Array;
  readonly widths: Float64Array;
  /** Imagined rows before the first real one. */
  readonly before: number;
  readonly widestMetres: number;
}

function extendedRows(north: Float64Array, reachMetres: number): RowLattice {
  const rows = north.length;
  const first = north[1] - north[0];
  const last = north[rows - 1] - north[rows - 2];
  const before = Math.ceil(reachMetres / Math.abs(first)) + 1;
  const after = Math.ceil(reachMetres / Math.abs(last)) + 1;
  const positions = Float64Array.from({ length: before + rows + after }, (_, i) => {
    const row = i - before;
    if (row < 0) return north[0] + row * first;
    return row < rows ? north[row] : north[rows - 1] + (row - rows + 1) * last;
  });
  const widths = positions.map((_, i) => {
    const from = positions[Math.max(0, i - 1)];
    const to = positions[Math.min(positions.length - 1, i + 1)];
    return Math.abs(to - from) / 2;
  });
  return { positions, widths, before, widestMetres: widths.reduce((a, b) => Math.max(a, b), 0) };
}

function lowPassColumns(
  plane: Float64Array,
  { rows, columns }: PlaneGeometry,
  { positions, widths, before }: RowLattice,
  kernel: DistanceKernel,
): FilteredPlane {
  const values = new Float64Array(plane.length);
  const share = new Float64Array(plane.length);
  for (let row = 0; row < rows; row++) {
    const here = positions[before + row];
    const weights = positions.map((position, i) => kernelAt(kernel, position - here) * widths[i]);
    const total = weights.reduce((a, b) => a + b, 0);
    const start = row * columns;
    for (let source = 0; source < rows; source++) {
      const weight = weights[before + source] / total;
      if (weight === 0) continue;
      for (let column = 0; column < columns; column++) {
        const value = plane[source * columns + column];
        if (Number.isNaN(value)) continue;
        values[start + column] += weight * value;
        share[start + column] += weight;
      }
    }
    for (let cell = start; cell < start + columns; cell++) {
      values[cell] = share[cell] < leastWeightShare ? Number.NaN : values[cell] / share[cell];
    }
  }
  return { values, share };
}
