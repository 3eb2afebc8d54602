import { rowMean } from "../numeric/row-mean";
import type { GridGeometry } from "../ocean/grid-geometry";
import type { PlaneLookup } from "../ocean/quantities/define";
import { planesFrom } from "../ocean/quantities/evaluate";
import type { HeightRecord } from "./record";

/** Least share of a row's ocean cells that must be valid for a zonal mean. Common practice, no source. */
export const leastZonalCoverage = 0.5;

/** Zonal means of one plane, one a row; NaN where under half of the row's ocean cells are valid. */
export function zonalMeans(plane: Float64Array, record: HeightRecord, weights: Float64Array | null): Float64Array {
  const { rows, columns } = record.cube;
  return Float64Array.from(
    { length: rows },
    (_, row) => rowMean(plane, row * columns, columns, record.ocean, weights, leastZonalCoverage).mean,
  );
}

/** Relative widths of the columns where longitudes are uneven; null for even ones. */
export function columnWeights(record: HeightRecord): Float64Array | null {
  const { values, even } = record.axes.longitude;
  if (even) return null;
  const last = values.length - 1;
  return values.map(
    (_, i) => Math.abs(values[Math.min(last, i + 1)] - values[Math.max(0, i - 1)]) / (i > 0 && i < last ? 2 : 1),
  );
}

/** Where a record's dates are reduced to: shared by the workers, each writes its own dates. */
export interface ReductionTarget {
  readonly quantities: readonly string[];
  /** `zonal[(q * rows + row) * dates + t]`: zonal means, series contiguous in time. */
  readonly zonal: Float64Array;
  /** Cells kept whole for spectra and colour limits. */
  readonly sampleCells: Int32Array;
  /** `samples[(q * cells + i) * dates + t]`. */
  readonly samples: Float32Array;
}

/** Reduces one date: zonal means and sampled cells of every quantity named. */
export function reduceDate(
  heights: Float64Array,
  date: number,
  record: HeightRecord,
  geometry: GridGeometry,
  weights: Float64Array | null,
  target: ReductionTarget,
): void {
  const { dates, rows } = record.cube;
  const planes: PlaneLookup = planesFrom(heights, geometry);
  target.quantities.forEach((id, q) => {
    const plane = planes(id);
    const means = zonalMeans(plane, record, weights);
    for (let row = 0; row < rows; row++) target.zonal[(q * rows + row) * dates + date] = means[row];
    const { sampleCells, samples } = target;
    for (let i = 0; i < sampleCells.length; i++) {
      samples[(q * sampleCells.length + i) * dates + date] = plane[sampleCells[i]];
    }
  });
}

/** Every `stride`-th ocean cell such that about `most` are kept, evenly over the region. */
export function chooseSampleCells(record: HeightRecord, most: number): Int32Array {
  const ocean: number[] = [];
  record.ocean.forEach((isOcean, cell) => {
    if (isOcean) ocean.push(cell);
  });
  const stride = Math.max(1, Math.ceil(ocean.length / most));
  return Int32Array.from(ocean.filter((_, i) => i % stride === 0));
}
