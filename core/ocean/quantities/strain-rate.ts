import { defineQuantity } from "./define";

/** Total strain rate in s-1: sqrt(normal^2 + shear^2). NaN where either strain is. */
export const strainRate = defineQuantity({
  id: "strain-rate",
  title: "Strain rate",
  units: "s-1",
  standardName: "",
  variable: "strain_rate",
  linear: false,
  signed: false,
  inputs: ["normal-strain", "shear-strain"],
  compute: (plane) => {
    const normal = plane("normal-strain");
    const shear = plane("shear-strain");
    return normal.map((value, i) => Math.sqrt(value * value + shear[i] * shear[i]));
  },
});
