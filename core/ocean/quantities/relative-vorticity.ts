import { relativeVorticity } from "../vorticity";
import { defineQuantity } from "./define";
import { gradientsFrom, velocityFrom } from "./intermediates";

/** Relative vorticity of the geostrophic flow in s-1. NaN rules: see relativeVorticity. */
export const vorticity = defineQuantity({
  id: "vorticity",
  title: "Relative vorticity",
  units: "s-1",
  standardName: "ocean_relative_vorticity",
  variable: "vorticity",
  linear: true,
  signed: true,
  inputs: ["u", "v"],
  compute: (plane, geometry) => relativeVorticity(velocityFrom(plane), geometry, gradientsFrom(plane)),
});
