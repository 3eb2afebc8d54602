import { defineQuantity } from "./define";

/** Speed of the cyclogeostrophic flow in m s-1. NaN where its u or v is. */
export const cyclogeostrophicSpeed = defineQuantity({
  id: "speed-cyclogeostrophic",
  title: "Speed, cyclogeostrophic",
  units: "m s-1",
  standardName: "",
  variable: "speed_cyclogeostrophic",
  linear: false,
  signed: false,
  inputs: ["u-cyclogeostrophic", "v-cyclogeostrophic"],
  compute: (plane) => {
    const u = plane("u-cyclogeostrophic");
    const v = plane("v-cyclogeostrophic");
    return u.map((value, i) => Math.sqrt(value * value + v[i] * v[i]));
  },
});
