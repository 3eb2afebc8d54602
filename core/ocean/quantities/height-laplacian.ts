import { laplacian } from "../curvature";
import { defineQuantity } from "./define";

/** Laplacian of sea-surface height in m-1; g/f times it is vorticity without the beta term. NaN rules: see laplacian. */
export const heightLaplacian = defineQuantity({
  id: "height-laplacian",
  title: "Laplacian of height",
  units: "m-1",
  standardName: "",
  variable: "height_laplacian",
  linear: true,
  signed: true,
  inputs: ["height"],
  compute: (plane, geometry) => laplacian(plane("height"), geometry),
});
