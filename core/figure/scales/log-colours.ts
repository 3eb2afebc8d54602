/** Decades that the colours of a spectrum span, below its greatest value. */
const spannedDecades = 3;
/** The lower limit in words. */
export const decades = "10⁻³";

/** Logarithms to base ten; NaN for what is not above zero, so that it stays blank. */
export function logValues(values: ArrayLike<number>): Float32Array {
  return Float32Array.from(values, (value) => (value > 0 ? Math.log10(value) : Number.NaN));
}

/** Colour limits of logarithms: the greatest, and three decades under it. */
export function logLimits(logs: Float32Array): readonly [lower: number, upper: number] {
  let most = Number.NEGATIVE_INFINITY;
  for (const value of logs) if (value > most) most = value;
  return Number.isFinite(most) ? [most - spannedDecades, most] : [-spannedDecades, 0];
}
