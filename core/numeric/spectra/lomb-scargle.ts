export interface LombScargle {
  /**
   * Half the squared amplitude a sinusoid fits, times half the number of samples: units². On even sampling at k / (n step),
   * 0 < k < n / 2, it is the periodogram |X|² / n, and its sum times 2 / n is the variance.
   */
  readonly power: Float64Array;
  /** Share of the sum of squares that a least-squares sinusoid explains: 0 … 1, no unit. */
  readonly share: Float64Array;
}

/**
 * Lomb-Scargle periodogram of an uneven series at the frequencies given (cycles a unit of `times`, above 0). No taper;
 * the caller removes the mean (and trend). NaN values are left out; all NaN where nothing is left.
 * Ref: Lomb 1976, Astrophys. Space Sci. 39, 447-462; Scargle 1982, Astrophys. J. 263, 835-853 [from memory].
 */
export function lombScargle(times: Float64Array, values: Float64Array, frequencies: Float64Array): LombScargle {
  const valid = Array.from(values.keys()).filter((i) => !Number.isNaN(values[i]));
  let squares = 0;
  for (const i of valid) squares += values[i] * values[i];
  const power = frequencies.map((frequency) => {
    const turn = 2 * Math.PI * frequency;
    let sineOfDouble = 0;
    let cosineOfDouble = 0;
    for (const i of valid) {
      sineOfDouble += Math.sin(2 * turn * times[i]);
      cosineOfDouble += Math.cos(2 * turn * times[i]);
    }
    // The offset that makes cosine and sine orthogonal on these times.
    const offset = Math.atan2(sineOfDouble, cosineOfDouble) / 2;
    let [alongCosine, alongSine, cosineSquares, sineSquares] = [0, 0, 0, 0];
    for (const i of valid) {
      const cosine = Math.cos(turn * times[i] - offset);
      const sine = Math.sin(turn * times[i] - offset);
      alongCosine += values[i] * cosine;
      alongSine += values[i] * sine;
      cosineSquares += cosine * cosine;
      sineSquares += sine * sine;
    }
    // At the Nyquist frequency of even times the sine has no extent, and nothing to explain.
    const part = (product: number, extent: number) =>
      extent > 1e-12 * valid.length ? (product * product) / extent : 0;
    return valid.length > 0 ? (part(alongCosine, cosineSquares) + part(alongSine, sineSquares)) / 2 : Number.NaN;
  });
  return { power, share: power.map((value) => (2 * value) / squares) };
}
