import { scaledByGravityOverCoriolis } from "../geostrophy";
import { eastwardDerivative } from "../gradients";
import { defineQuantity } from "./define";

/** Northward geostrophic velocity in m s-1: (g/f) d(height)/dx. NaN rules: see geostrophicVelocity. */
export const northwardVelocity = defineQuantity({
  id: "v",
  title: "Northward velocity",
  units: "m s-1",
  standardName: "surface_geostrophic_northward_sea_water_velocity",
  variable: "v",
  linear: true,
  signed: true,
  inputs: ["height"],
  compute: (plane, geometry) => scaledByGravityOverCoriolis(eastwardDerivative(plane("height"), geometry), geometry, 1),
});
