import { centredAxis, oneSidedAxis } from "./density";
import { planeDensity, type SteppedPlane, wrapped } from "./plane";
import type { WavenumberSettings } from "./wavenumber";

export interface FrequencyWavenumberSpectrum {
  /** Cycles a unit of the time step, from 0. */
  readonly frequency: Float64Array;
  /** Cycles a metre, rising, zero at index floor(columns / 2). Negative: the pattern moves west (or south). */
  readonly wavenumber: Float64Array;
  /**
   * Density, row-major frequency × wavenumber, one-sided in frequency and two-sided in wavenumber: its sum times both steps
   * is the variance. Units² m times the time step's unit. NaN where too little of the matrix has values.
   */
  readonly density: Float64Array;
  /** Share of the matrix with values after bridging. */
  readonly share: number;
}

/**
 * Frequency-wavenumber spectrum of a matrix whose rows are times (`rowStep` apart) and whose columns are longitudes or
 * latitudes (`columnStep` metres apart, negative where the coordinate falls). Waves are cos 2 pi (wavenumber x - frequency t)
 * with frequency >= 0, so a negative wavenumber is westward (southward) motion at speed frequency / wavenumber. Gaps, trend
 * and tapers as for a plane: short gaps are bridged along the row first.
 */
export function frequencyWavenumberSpectrum(
  matrix: SteppedPlane,
  settings: WavenumberSettings,
): FrequencyWavenumberSpectrum {
  const { rows, columns } = matrix;
  const { density, share } = planeDensity(matrix, settings);
  const frequency = oneSidedAxis(rows, Math.abs(matrix.rowStep));
  const shift = Math.floor(columns / 2);
  const out = new Float64Array(frequency.length * columns);
  for (let f = 0; f < frequency.length; f++) {
    const isOneOfAKind = f === 0 || (rows % 2 === 0 && f === frequency.length - 1);
    for (let k = 0; k < columns; k++) {
      // The transform's phase is f t + k x: a wave k x - f t lies at the opposite wavenumber.
      out[f * columns + k] = (isOneOfAKind ? 1 : 2) * density[f * columns + wrapped(shift - k, columns)];
    }
  }
  return { frequency, wavenumber: centredAxis(columns, Math.abs(matrix.columnStep)), density: out, share };
}
