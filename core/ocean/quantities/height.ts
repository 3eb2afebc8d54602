import { defineQuantity } from "./define";

/** Sea-surface height in metres, as the file gives it. */
export const height = defineQuantity({
  id: "height",
  title: "Sea-surface height",
  units: "m",
  standardName: "",
  variable: "height",
  linear: true,
  signed: true,
  inputs: ["height"],
  compute: (plane) => plane("height"),
});
