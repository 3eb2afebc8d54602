import { type Meridian, profileDerivative } from "./meridian";

/**
 * Northward gradient of the absolute vorticity of a zonal flow in m⁻¹ s⁻¹: beta - d/dy[(1 / r) d(U r)/dy], r the radius of
 * the parallel; on a beta-plane beta - U_yy. `flow` is one value a row in m s⁻¹; NaN where it
 * is and where no centred difference fits (two rows at each end): one-sided second differences would make false signs.
 */
export function absoluteVorticityGradient(flow: Float64Array, meridian: Meridian): Float64Array {
  const { parallelRadius, beta } = meridian;
  const circulation = profileDerivative(
    flow.map((value, row) => value * parallelRadius[row]),
    meridian,
    true,
  );
  const shear = circulation.map((value, row) => value / parallelRadius[row]);
  return profileDerivative(shear, meridian, true).map((value, row) => beta[row] - value);
}

/**
 * Latitudes at which a gradient changes sign, linearly interpolated between rows, in order of row. Any means that the
 * Rayleigh-Kuo condition, necessary for barotropic instability, is met; none means that the flow is stable. A change across
 * NaN rows is not counted; a row of exactly zero is one crossing where its neighbours differ in sign.
 */
export function signChanges(gradient: Float64Array, latitude: Float64Array): number[] {
  const crossings: number[] = [];
  let last = -1;
  for (let row = 0; row < gradient.length; row++) {
    if (Number.isNaN(gradient[row])) last = -1;
    else if (gradient[row] !== 0) {
      if (last >= 0 && gradient[last] > 0 !== gradient[row] > 0) {
        const share = gradient[last] / (gradient[last] - gradient[row]);
        crossings.push(
          row - last === 1 ? latitude[last] + share * (latitude[row] - latitude[last]) : latitude[(row + last) >> 1],
        );
      }
      last = row;
    }
  }
  return crossings;
}
