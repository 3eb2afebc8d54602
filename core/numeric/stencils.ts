/** Points a centred difference may use; the half-width is (points - 1) / 2. */
export const stencilPoints = [3, 5, 7, 9] as const;
export type StencilPoints = (typeof stencilPoints)[number];

/**
 * Weights of the first derivative at `at` for values known at `nodes`, exact for polynomials of degree nodes.length - 1.
 * Units: 1 over the nodes' unit. Ref: Fornberg 1988, Mathematics of Computation 51, 699-706 (recursion for one derivative).
 */
export function firstDerivativeWeights(nodes: ArrayLike<number>, at: number): Float64Array {
  const count = nodes.length;
  const value = new Float64Array(count);
  const slope = new Float64Array(count);
  value[0] = 1;
  let product = 1;
  let previousDistance = nodes[0] - at;
  for (let i = 1; i < count; i++) {
    let nextProduct = 1;
    const distance = nodes[i] - at;
    for (let j = 0; j < i; j++) {
      const gap = nodes[i] - nodes[j];
      nextProduct *= gap;
      if (j === i - 1) {
        slope[i] = (product * (value[i - 1] - previousDistance * slope[i - 1])) / nextProduct;
        value[i] = (-product * previousDistance * value[i - 1]) / nextProduct;
      }
      slope[j] = (distance * slope[j] - value[j]) / gap;
      value[j] = (distance * value[j]) / gap;
    }
    product = nextProduct;
    previousDistance = distance;
  }
  return slope;
}

/** Ratio of the centred difference to the true derivative for a wave of `cellsPerWavelength` cells, even spacing. */
export function stencilResponse(points: StencilPoints, cellsPerWavelength: number): number {
  const phase = (2 * Math.PI) / cellsPerWavelength;
  return sumOverHalf(points, (weight, j) => 2 * weight * Math.sin(j * phase)) / phase;
}

/** Standard deviation of the difference times spacing, for white noise of unit standard deviation, even spacing. */
export function stencilNoiseGain(points: StencilPoints): number {
  return Math.sqrt(sumOverHalf(points, (weight) => 2 * weight * weight));
}

function sumOverHalf(points: StencilPoints, term: (weight: number, j: number) => number): number {
  const half = (points - 1) / 2;
  const nodes = Float64Array.from({ length: points }, (_, i) => i - half);
  const weights = firstDerivativeWeights(nodes, 0);
  let sum = 0;
  for (let j = 1; j <= half; j++) sum += term(weights[half + j], j);
  return sum;
}
