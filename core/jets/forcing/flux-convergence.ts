import { areaMean, type Meridian, profileDerivative } from "./meridian";

/**
 * Acceleration of the zonal-mean eastward flow by the eddies, in m s⁻²: minus the divergence of the eddy momentum flux
 * (m² s⁻², one value a row), -(1 / r²) d(flux r²)/dy with r the radius of the parallel. On a sphere this is
 * -(1 / (R cos² phi)) d(flux cos² phi)/dphi. Positive pushes eastward. NaN where the flux is or no difference fits.
 */
export function fluxConvergence(flux: Float64Array, meridian: Meridian): Float64Array {
  const square = meridian.parallelRadius.map((radius) => radius * radius);
  const derivative = profileDerivative(
    flux.map((value, row) => value * square[row]),
    meridian,
  );
  return derivative.map((value, row) => -value / square[row]);
}

/**
 * Rate at which the eddies give kinetic energy to the zonal-mean flow, in m² s⁻³ (W kg⁻¹): the area mean of flow times
 * convergence. Positive: eddies feed the jets. Rows where either is NaN are left out.
 */
export function eddyToMeanConversion(flow: Float64Array, convergence: Float64Array, meridian: Meridian): number {
  return areaMean(
    flow.map((value, row) => value * convergence[row]),
    meridian,
  );
}
