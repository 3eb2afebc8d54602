/**
 * Low-pass weights k = -halfWidth … halfWidth for a cut-off in cycles a sample: 2 fc sinc(2 fc k) sinc(k / halfWidth),
 * scaled to sum 1. Amplitude response is about one half at the cut-off. Ref: Duchon 1979, J. Appl. Meteor. 18, 1016-1022.
 */
export function lanczosLowPass(cutoffPerSample: number, halfWidth: number): Float64Array {
  const weights = lanczosRawWeights(cutoffPerSample, halfWidth);
  let sum = 0;
  for (const weight of weights) sum += weight;
  return weights.map((weight) => weight / sum);
}

/** The weights before they are scaled to sum 1. */
export function lanczosRawWeights(cutoffPerSample: number, halfWidth: number): Float64Array {
  return Float64Array.from({ length: 2 * halfWidth + 1 }, (_, i) => {
    const k = i - halfWidth;
    return 2 * cutoffPerSample * sinc(2 * cutoffPerSample * k) * sinc(k / halfWidth);
  });
}

/** sin(pi x) / (pi x), 1 at 0. */
export function sinc(x: number): number {
  return x === 0 ? 1 : Math.sin(Math.PI * x) / (Math.PI * x);
}

/** Amplitude response of symmetric weights at a frequency in cycles a sample. */
export function symmetricResponse(weights: Float64Array, frequencyPerSample: number): number {
  const halfWidth = (weights.length - 1) / 2;
  let sum = weights[halfWidth];
  for (let k = 1; k <= halfWidth; k++) {
    sum += 2 * weights[halfWidth + k] * Math.cos(2 * Math.PI * frequencyPerSample * k);
  }
  return sum;
}
