import { kineticEnergyOf } from "../kinetic-energy";
import { defineQuantity } from "./define";
import { velocityFrom } from "./intermediates";

/**
 * Kinetic energy of the geostrophic flow per mass, mean flow and all, in m2 s-2: (u^2 + v^2)/2. NaN where u or v is.
 * CF's specific_kinetic_energy_of_sea_water is of the whole motion, so that it is not claimed here.
 */
export const kineticEnergy = defineQuantity({
  id: "kinetic-energy",
  title: "Kinetic energy",
  units: "m2 s-2",
  standardName: "",
  variable: "kinetic_energy",
  linear: false,
  signed: false,
  inputs: ["u", "v"],
  compute: (plane) => kineticEnergyOf(velocityFrom(plane)),
});
