import { scaledByGravityOverCoriolis } from "../geostrophy";
import { northwardDerivative } from "../gradients";
import { defineQuantity } from "./define";

/** Eastward geostrophic velocity in m s-1: -(g/f) d(height)/dy. NaN rules: see geostrophicVelocity. */
export const eastwardVelocity = defineQuantity({
  id: "u",
  title: "Eastward velocity",
  units: "m s-1",
  standardName: "surface_geostrophic_eastward_sea_water_velocity",
  variable: "u",
  linear: true,
  signed: true,
  inputs: ["height"],
  compute: (plane, geometry) =>
    scaledByGravityOverCoriolis(northwardDerivative(plane("height"), geometry), geometry, -1),
});
