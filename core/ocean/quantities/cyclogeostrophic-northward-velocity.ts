import { defineQuantity } from "./define";

/** Northward velocity in m s-1 with the acceleration along curved paths in the balance. NaN rules: see cyclogeostrophicFlow. */
export const cyclogeostrophicNorthwardVelocity = defineQuantity({
  id: "v-cyclogeostrophic",
  title: "Northward velocity, cyclogeostrophic",
  units: "m s-1",
  standardName: "",
  variable: "v_cyclogeostrophic",
  linear: false,
  signed: true,
  inputs: ["u", "v"],
  compute: (plane) => plane("cyclogeostrophic-flow").slice(plane("u").length, 2 * plane("u").length),
});
