import { defineQuantity } from "./define";

/** Eastward velocity in m s-1 with the acceleration along curved paths in the balance. NaN rules: see cyclogeostrophicFlow. */
export const cyclogeostrophicEastwardVelocity = defineQuantity({
  id: "u-cyclogeostrophic",
  title: "Eastward velocity, cyclogeostrophic",
  units: "m s-1",
  standardName: "",
  variable: "u_cyclogeostrophic",
  linear: false,
  signed: true,
  inputs: ["u", "v"],
  compute: (plane) => plane("cyclogeostrophic-flow").slice(0, plane("u").length),
});
