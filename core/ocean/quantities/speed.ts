import { defineQuantity } from "./define";

/** Speed of the geostrophic flow in m s-1: sqrt(u^2 + v^2). NaN where u or v is. */
export const speed = defineQuantity({
  id: "speed",
  title: "Speed",
  units: "m s-1",
  standardName: "",
  variable: "speed",
  linear: false,
  signed: false,
  inputs: ["u", "v"],
  compute: (plane) => {
    const u = plane("u");
    const v = plane("v");
    return u.map((value, i) => Math.sqrt(value * value + v[i] * v[i]));
  },
});
