/** Depth-independent eastward flow that carries the waves, in m s-1, and its second northward derivative in m-1 s-1. */
export interface CarryingFlow {
  readonly speed: number;
  readonly curvature: number;
}

/**
 * Angular frequency of a Rossby wave in s-1: U k - (beta - U_yy) k / (k² + l² + Ld⁻²). Wavenumbers in rad m-1, Ld in metres
 * (Infinity: no deformation of the surface or interface), k > 0 and a negative frequency means westward phase.
 *
 * The flow is taken not to vary with depth, so that it shifts the frequency in full and changes the gradient by its
 * curvature alone; a flow confined to the upper layer would add U Ld⁻² to the gradient. U_yy must vary slowly over the wave.
 * NaN for k = l = 0 without deformation. Textbook.
 */
export function rossbyFrequency(
  k: number,
  l: number,
  beta: number,
  deformationRadius: number,
  flow?: CarryingFlow,
): number {
  const gradient = beta - (flow?.curvature ?? 0);
  const shift = (flow?.speed ?? 0) * k;
  return shift - (gradient * k) / (k * k + l * l + 1 / (deformationRadius * deformationRadius));
}

/** Eastward phase speed in m s-1 of a Rossby wave, frequency over k; finite also for k = 0. */
export function rossbyPhaseSpeed(
  k: number,
  l: number,
  beta: number,
  deformationRadius: number,
  flow?: CarryingFlow,
): number {
  const gradient = beta - (flow?.curvature ?? 0);
  return (flow?.speed ?? 0) - gradient / (k * k + l * l + 1 / (deformationRadius * deformationRadius));
}

/** Speed of long waves, -beta Ld², in m s-1: westward, the same for all long wavelengths. */
export function longWaveSpeed(beta: number, deformationRadius: number): number {
  return -beta * deformationRadius * deformationRadius;
}

/** Greatest frequency without flow, beta Ld / 2 in s-1, reached at l = 0 and k = 1 / Ld. */
export function greatestRossbyFrequency(beta: number, deformationRadius: number): number {
  return (beta * deformationRadius) / 2;
}

/** Shortest period without flow, in days. */
export function shortestRossbyPeriodDays(beta: number, deformationRadius: number): number {
  return (2 * Math.PI) / greatestRossbyFrequency(beta, deformationRadius) / 86400;
}
