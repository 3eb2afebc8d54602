import { divergence as divergenceOf } from "../deformation";
import { defineQuantity } from "./define";
import { gradientsFrom, velocityFrom } from "./intermediates";

/** Horizontal divergence of the geostrophic flow in s-1; it mirrors -beta v / f. NaN rules: see deformation.ts. */
export const divergence = defineQuantity({
  id: "divergence",
  title: "Divergence",
  units: "s-1",
  standardName: "",
  variable: "divergence",
  linear: true,
  signed: true,
  inputs: ["u", "v"],
  compute: (plane, geometry) => divergenceOf(velocityFrom(plane), geometry, gradientsFrom(plane)),
});
