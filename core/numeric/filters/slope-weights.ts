/**
 * Weights, n = -halfWidth … halfWidth, of the least-squares slope per sample through 2 halfWidth + 1 even samples:
 * 3 n / (p (p + 1) (2 p + 1)). A straight line and a parabola give the same weights. The slope at sample t is
 * sum of weights[n + p] values[t + n]. Ref: Savitzky & Golay 1964, Anal. Chem. 36, 1627 [from memory].
 */
export function slopeWeights(halfWidth: number): Float64Array {
  const scale = 3 / (halfWidth * (halfWidth + 1) * (2 * halfWidth + 1));
  return Float64Array.from({ length: 2 * halfWidth + 1 }, (_, i) => scale * (i - halfWidth));
}

/** Standard deviation of the slope times the spacing, for white noise of unit standard deviation. */
export function slopeNoiseGain(halfWidth: number): number {
  return Math.sqrt(3 / (halfWidth * (halfWidth + 1) * (2 * halfWidth + 1)));
}

/** Ratio of the slope to the true derivative of a sinusoid, at a frequency in cycles a sample; 1 at zero. */
export function slopeResponse(halfWidth: number, frequencyPerSample: number): number {
  const phase = 2 * Math.PI * frequencyPerSample;
  if (phase === 0) return 1;
  const scale = 3 / (halfWidth * (halfWidth + 1) * (2 * halfWidth + 1));
  let sum = 0;
  for (let n = 1; n <= halfWidth; n++) sum += 2 * scale * n * Math.sin(n * phase);
  return sum / phase;
}
