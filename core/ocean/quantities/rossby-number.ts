import { defineQuantity } from "./define";

/** Relative vorticity over the Coriolis parameter (Rossby number), without unit. NaN where vorticity is. */
export const rossbyNumber = defineQuantity({
  id: "rossby-number",
  title: "Vorticity / f",
  units: "1",
  standardName: "",
  variable: "rossby_number",
  linear: true,
  signed: true,
  inputs: ["vorticity"],
  compute: (plane, { rows, columns, coriolis }) => {
    const ratio = Float64Array.from(plane("vorticity"));
    for (let row = 0; row < rows; row++) {
      for (let i = row * columns; i < (row + 1) * columns; i++) ratio[i] /= coriolis[row];
    }
    return ratio;
  },
});
