import { fourierTransform } from "../fourier";

/**
 * "power": divided by the tapers' power, right on average for any record and what statistics of the spectrum assume.
 * "variance": scaled further so that each piece's integral is that piece's own variance, to rounding.
 */
export type Scaling = "power" | "variance";

/**
 * One-sided density of one gap-free piece, averaged over tapers of unit power (sum of squares 1). Bins k / (n step), k = 0 …
 * floor(n / 2); units² times the unit of `step`. Its sum over the bins times 1 / (n step) is the mean over tapers of the sum
 * of (taper times piece)²: the mean square of the piece for a boxcar, and for any taper with scaling "variance".
 */
export function oneSidedDensity(
  piece: Float64Array,
  tapers: readonly Float64Array[],
  step: number,
  scaling: Scaling = "power",
): Float64Array {
  const length = piece.length;
  const bins = Math.floor(length / 2) + 1;
  const density = new Float64Array(bins);
  for (const taper of tapers) {
    const { real, imaginary } = fourierTransform(piece.map((value, i) => value * taper[i]));
    for (let k = 0; k < bins; k++) density[k] += real[k] * real[k] + imaginary[k] * imaginary[k];
  }
  for (let k = 0; k < bins; k++) {
    const isOneOfAKind = k === 0 || (length % 2 === 0 && k === bins - 1);
    density[k] *= ((isOneOfAKind ? 1 : 2) * step) / tapers.length;
  }
  return scaling === "power" ? density : scaledToMeanSquare(density, piece, 1 / (length * step));
}

/** The density scaled so that its sum times `cell` is the mean square of the valid values; zero stays zero. */
export function scaledToMeanSquare(density: Float64Array, values: Float64Array, cell: number): Float64Array {
  let squares = 0;
  let count = 0;
  for (const value of values) {
    if (Number.isNaN(value)) continue;
    squares += value * value;
    count++;
  }
  let integral = 0;
  for (const value of density) integral += value * cell;
  const factor = integral > 0 ? squares / count / integral : 1;
  return density.map((value) => value * factor);
}

/** Frequencies or wavenumbers of `oneSidedDensity`, cycles a unit of step. */
export function oneSidedAxis(length: number, step: number): Float64Array {
  return Float64Array.from({ length: Math.floor(length / 2) + 1 }, (_, k) => k / (length * step));
}

/** Two-sided axis in ascending order, zero at index floor(length / 2); cycles a unit of step. */
export function centredAxis(length: number, step: number): Float64Array {
  return Float64Array.from({ length }, (_, k) => (k - Math.floor(length / 2)) / (length * step));
}
