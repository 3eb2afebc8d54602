import { normalStrain as normalStrainOf } from "../deformation";
import { defineQuantity } from "./define";
import { gradientsFrom, velocityFrom } from "./intermediates";

/** Normal strain of the geostrophic flow in s-1: du/dx - dv/dy - v tan(latitude)/R. NaN rules: see deformation.ts. */
export const normalStrain = defineQuantity({
  id: "normal-strain",
  title: "Normal strain",
  units: "s-1",
  standardName: "",
  variable: "normal_strain",
  linear: true,
  signed: true,
  inputs: ["u", "v"],
  compute: (plane, geometry) => normalStrainOf(velocityFrom(plane), geometry, gradientsFrom(plane)),
});
