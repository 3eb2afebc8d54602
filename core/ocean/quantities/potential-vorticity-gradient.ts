import { absoluteVorticityGradient } from "../curvature";
import { defineQuantity } from "./define";

/**
 * Barotropic potential-vorticity gradient beta - d/dy[(1/(R cos(latitude))) d(u cos(latitude))/d(latitude)] in m-1 s-1, of
 * the eastward velocity at each longitude as if it were zonal. Affine in height: beta stays where the height is flat, so
 * that a filter on its series would remove beta; `linear` is false and the height is filtered instead.
 * NaN rules: see absoluteVorticityGradient.
 */
export const potentialVorticityGradient = defineQuantity({
  id: "potential-vorticity-gradient",
  title: "Beta − U_yy",
  units: "m-1 s-1",
  standardName: "",
  variable: "potential_vorticity_gradient",
  linear: false,
  signed: true,
  inputs: ["u"],
  compute: (plane, geometry) => absoluteVorticityGradient(plane("u"), geometry),
});
