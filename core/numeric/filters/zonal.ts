import { type BandFilter, filterSeries, weightShare } from "../band-filter";
import { runningMeanWeights } from "./running-mean";
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
 * A low-pass whose cut-off is this many times the length of a periodic row is the row's mean: of the row's first harmonic,
 * and of all others, less than 1e-4 passes.
 */
const turnsOfMean = 10;

/**
 * Lanczos filter along each row for wavelengths in kilometres along the parallel: weights are made for every row, as its
 * spacing asks. Gap-aware as in time (filterSeries): NaN where less than a quarter of either low-pass's weight lies on data,
 * a constant stays constant. Periodic rows are filtered round the turn. Errors (FilterRefusal): a bad band, a shortest
 * wavelength under two cells of the widest row.
 */
export function filterZonal(plane: Float64Array, geometry: PlaneGeometry, band: WavelengthBand): FilteredPlane {
  const { rows, columns, eastSpacingMetres } = geometry;
  const kernels = bandKernels(band);
  checkResolved(
    kernels.fast,
    eastSpacingMetres.reduce((a, b) => Math.max(a, b), 0),
    "along a row",
  );
  const values = new Float64Array(plane.length);
  const share = new Float64Array(plane.length);
  for (let row = 0; row < rows; row++) {
    const line = plane.subarray(row * columns, (row + 1) * columns);
    const filtered = filterRow(line, kernels, eastSpacingMetres[row], geometry.periodic);
    values.set(filtered.values, row * columns);
    share.set(filtered.share, row * columns);
  }
  return { values, share };
}

type Kernels = ReturnType<typeof bandKernels>;

function filterRow(line: Float64Array, kernels: Kernels, spacing: number, periodic: boolean): FilteredPlane {
  const columns = line.length;
  if (!periodic && isFarLongerThan(kernels, columns * spacing)) return blankRow(columns);
  const filter = rowFilter(kernels, spacing, periodic ? columns : Number.POSITIVE_INFINITY);
  if (!periodic) return { values: filterSeries(line, filter), share: weightShare(filter, validity(line)) };
  const { halfWidth } = filter;
  const around = Float64Array.from({ length: columns + 2 * halfWidth }, (_, i) => line[wrap(i - halfWidth, columns)]);
  const at = Int32Array.from({ length: columns }, (_, i) => i + halfWidth);
  const share = weightShare(filter, validity(around)).subarray(halfWidth, halfWidth + columns);
  return { values: filterSeries(around, filter, at), share };
}

/** On a row ten times shorter than a cut-off less than a quarter of that low-pass's weight can lie. */
function isFarLongerThan({ fast, slow }: Kernels, rowMetres: number): boolean {
  return Math.max(fast?.cutoffMetres ?? 0, slow?.cutoffMetres ?? 0) > 10 * rowMetres;
}

function blankRow(columns: number): FilteredPlane {
  return { values: new Float64Array(columns).fill(Number.NaN), share: new Float64Array(columns) };
}

function rowFilter({ fast, slow }: Kernels, spacing: number, turn: number): BandFilter {
  const isMean = (kernel: DistanceKernel) => kernel.cutoffMetres > turnsOfMean * turn * spacing;
  const halfWidthOf = (kernel: DistanceKernel | null) => {
    if (!kernel) return 0;
    return isMean(kernel) ? Math.floor(turn / 2) : Math.ceil(kernel.reachMetres / spacing);
  };
  const halfWidth = Math.max(halfWidthOf(fast), halfWidthOf(slow));
  const weightsOf = (kernel: DistanceKernel) =>
    isMean(kernel) ? meanWeights(turn, halfWidth) : evenWeights(kernel, halfWidth, spacing);
  return { halfWidth, fast: fast && weightsOf(fast), slow: slow && weightsOf(slow) };
}

function evenWeights(kernel: DistanceKernel, halfWidth: number, spacing: number): Float64Array {
  const weights = Float64Array.from({ length: 2 * halfWidth + 1 }, (_, i) =>
    kernelAt(kernel, (i - halfWidth) * spacing),
  );
  const sum = weights.reduce((a, b) => a + b, 0);
  return weights.map((weight) => weight / sum);
}

/** One turn of equal weights; an even count has halves at both ends, which are the same cell. */
function meanWeights(turn: number, halfWidth: number): Float64Array {
  const own = runningMeanWeights(turn);
  const weights = new Float64Array(2 * halfWidth + 1);
  weights.set(own, halfWidth - (own.length - 1) / 2);
  return weights;
}

function validity(line: Float64Array): Uint8Array {
  return Uint8Array.from(line, (value) => (Number.isNaN(value) ? 0 : 1));
}

function wrap(column: number, columns: number): number {
  return ((column % columns) + columns) % columns;
}
