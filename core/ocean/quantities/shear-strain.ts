import { shearStrain as shearStrainOf } from "../deformation";
import { defineQuantity } from "./define";
import { gradientsFrom, velocityFrom } from "./intermediates";

/** Shear strain of the geostrophic flow in s-1: dv/dx + du/dy + u tan(latitude)/R. NaN rules: see deformation.ts. */
export const shearStrain = defineQuantity({
  id: "shear-strain",
  title: "Shear strain",
  units: "s-1",
  standardName: "",
  variable: "shear_strain",
  linear: true,
  signed: true,
  inputs: ["u", "v"],
  compute: (plane, geometry) => shearStrainOf(velocityFrom(plane), geometry, gradientsFrom(plane)),
});
