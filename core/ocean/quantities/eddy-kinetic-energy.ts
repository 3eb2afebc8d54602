import { geostrophicVelocity } from "../geostrophy";
import { kineticEnergyOf } from "../kinetic-energy";
import { defineQuantity } from "./define";

/**
 * Eddy kinetic energy per mass in m2 s-2: (u'^2 + v'^2)/2, u' and v' the geostrophic flow of the plane "height-anomaly",
 * the height about each cell's mean over the period. What mean was taken off, and over which period, belongs beside every
 * number. NaN where the anomaly's velocity is.
 */
export const eddyKineticEnergy = defineQuantity({
  id: "eddy-kinetic-energy",
  title: "Eddy kinetic energy",
  units: "m2 s-2",
  standardName: "",
  variable: "eddy_kinetic_energy",
  linear: false,
  signed: false,
  inputs: ["height-anomaly"],
  compute: (plane, geometry) => kineticEnergyOf(geostrophicVelocity(plane("height-anomaly"), geometry)),
});
