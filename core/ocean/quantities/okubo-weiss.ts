import { defineQuantity } from "./define";

/**
 * Okubo-Weiss parameter in s-2: normal strain^2 + shear strain^2 - vorticity^2. Negative where rotation outweighs
 * strain. NaN where any of the three is. Thresholds are left to the reader of the map.
 */
export const okuboWeiss = defineQuantity({
  id: "okubo-weiss",
  title: "Okubo–Weiss",
  units: "s-2",
  standardName: "",
  variable: "okubo_weiss",
  linear: false,
  signed: true,
  inputs: ["normal-strain", "shear-strain", "vorticity"],
  compute: (plane) => {
    const normal = plane("normal-strain");
    const shear = plane("shear-strain");
    const rotation = plane("vorticity");
    return normal.map((value, i) => value * value + shear[i] * shear[i] - rotation[i] * rotation[i]);
  },
});
