import { rowMean } from "../numeric/row-mean";
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

/** Where a record's dates are reduced to for one quantity: shared by the workers, each writes its own dates. */
export interface ReductionTarget {
  readonly quantity: string;
  /** `zonal[row * dates + t]`: zonal means, series contiguous in time. */
  readonly zonal: Float64Array;
  /** Cells kept whole for spectra. */
  readonly sampleCells: Int32Array;
  /** `samples[cell * dates + t]`. */
  readonly samples: Float32Array;
}

/** Reduces one date's plane: zonal means and sampled cells. */
export function reducePlane(
  plane: Float64Array,
  date: number,
  record: HeightRecord,
  weights: Float64Array | null,
  { zonal, sampleCells, samples }: ReductionTarget,
): void {
  const { dates } = record.cube;
  zonalMeans(plane, record, weights).forEach((mean, row) => {
    zonal[row * dates + date] = mean;
  });
  for (let i = 0; i < sampleCells.length; i++) samples[i * dates + date] = plane[sampleCells[i]];
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
