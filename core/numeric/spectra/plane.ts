import { planeTransform } from "../fourier";
import { bridgeGaps } from "../gaps";
import { centredAxis, type Scaling, scaledToMeanSquare } from "./density";
import { detrendedPlane } from "./detrend";
import { taperFamily } from "./tapers";
import type { WavenumberSettings } from "./wavenumber";

/**
 * A row-major plane and its steps. A negative step says that the coordinate falls along that axis (rows from north to
 * south); axes of results always rise.
 */
export interface SteppedPlane {
  readonly values: Float64Array;
  readonly rows: number;
  readonly columns: number;
  readonly rowStep: number;
  readonly columnStep: number;
}

export interface PlaneSpectrum {
  /** Cycles a metre, rising, zero at index floor(columns / 2). Positive is eastward. */
  readonly zonal: Float64Array;
  /** Cycles a metre, rising, zero at index floor(rows / 2). Positive is northward. */
  readonly meridional: Float64Array;
  /**
   * Two-sided density, row-major meridional × zonal, symmetric about the origin: its sum times both steps is the variance.
   * Units² m². NaN where too little of the plane has values.
   */
  readonly density: Float64Array;
  /** Share of cells with values after bridging. */
  readonly share: number;
}

/**
 * Two-dimensional wavenumber spectrum of a plane with even steps in metres (take the middle latitude's zonal one). Short
 * gaps are bridged along rows, then along columns; what is still missing counts as a zero of the taper, whose lost power is
 * made good. Every product of a meridional and a zonal taper enters alike.
 */
export function planeSpectrum(plane: SteppedPlane, settings: WavenumberSettings): PlaneSpectrum {
  const { rows, columns } = plane;
  const { density, share } = planeDensity(plane, settings);
  const rowShift = Math.floor(rows / 2);
  const columnShift = Math.floor(columns / 2);
  const centred = new Float64Array(density.length);
  for (let l = 0; l < rows; l++) {
    for (let k = 0; k < columns; k++) {
      const source = wrapped(l - rowShift, rows) * columns + wrapped(k - columnShift, columns);
      centred[l * columns + k] = density[source];
    }
  }
  return {
    zonal: centredAxis(columns, Math.abs(plane.columnStep)),
    meridional: centredAxis(rows, Math.abs(plane.rowStep)),
    density: centred,
    share,
  };
}

/**
 * Two-sided density in the transform's own order (zero first), exp(-2 pi i (l row + k column)) with both coordinates rising;
 * units² times both steps' units. NaN where fewer cells than `leastShare` have values.
 */
export function planeDensity(
  plane: SteppedPlane,
  settings: WavenumberSettings,
): { readonly density: Float64Array; readonly share: number } {
  const { rows, columns } = plane;
  const bridged = bridgedPlane(rising(plane), rows, columns, settings.bridgedCells);
  const values = detrendedPlane(bridged, rows, columns, settings.detrend);
  let valid = 0;
  for (const value of values) if (!Number.isNaN(value)) valid++;
  const share = valid / values.length;
  if (valid === 0 || share < settings.leastShare) return { density: values.map(() => Number.NaN), share };
  const density = new Float64Array(values.length);
  const rowTapers = taperFamily(settings.taper, rows);
  const columnTapers = taperFamily(settings.taper, columns);
  const area = Math.abs(plane.rowStep * plane.columnStep);
  const products = rowTapers.length * columnTapers.length;
  for (const rowTaper of rowTapers) {
    for (const columnTaper of columnTapers) {
      const { tapered, power } = underTapers(values, rowTaper, columnTaper);
      const { real, imaginary } = planeTransform(tapered, rows, columns);
      const scale = area / (power * products);
      for (let i = 0; i < density.length; i++) {
        density[i] += (real[i] * real[i] + imaginary[i] * imaginary[i]) * scale;
      }
    }
  }
  return { density: rescaled(density, values, 1 / (rows * columns * area), settings.scaling), share };
}

function rescaled(density: Float64Array, values: Float64Array, cell: number, scaling?: Scaling): Float64Array {
  return scaling === "variance" ? scaledToMeanSquare(density, values, cell) : density;
}

function underTapers(
  values: Float64Array,
  rowTaper: Float64Array,
  columnTaper: Float64Array,
): { tapered: Float64Array; power: number } {
  const columns = columnTaper.length;
  let power = 0;
  const tapered = values.map((value, cell) => {
    if (Number.isNaN(value)) return 0;
    const weight = rowTaper[Math.floor(cell / columns)] * columnTaper[cell % columns];
    power += weight * weight;
    return value * weight;
  });
  return { tapered, power };
}

/** The values with rows and columns turned, where needed, so that both coordinates rise. */
function rising({ values, rows, columns, rowStep, columnStep }: SteppedPlane): Float64Array {
  return Float64Array.from(values, (_, cell) => {
    const row = Math.floor(cell / columns);
    const column = cell % columns;
    return values[(rowStep < 0 ? rows - 1 - row : row) * columns + (columnStep < 0 ? columns - 1 - column : column)];
  });
}

function bridgedPlane(values: Float64Array, rows: number, columns: number, longest: number): Float64Array {
  const out = values.slice();
  if (longest < 1) return out;
  for (let row = 0; row < rows; row++) {
    out.set(bridgeGaps(out.subarray(row * columns, (row + 1) * columns), longest).values, row * columns);
  }
  for (let column = 0; column < columns; column++) {
    const line = Float64Array.from({ length: rows }, (_, row) => out[row * columns + column]);
    bridgeGaps(line, longest).values.forEach((value, row) => {
      out[row * columns + column] = value;
    });
  }
  return out;
}

/** An index modulo the length, never negative. */
export function wrapped(index: number, length: number): number {
  return ((index % length) + length) % length;
}
