import { defineQuantity } from "./define";

/**
 * Relative vorticity over the Coriolis parameter (Rossby number), without unit. NaN where vorticity is, and in the belt at
 * the equator even where a blend gives velocities: the ratio grows without bound there.
 */
export const rossbyNumber = defineQuantity({
  id: "rossby-number",
  title: "Vorticity / f",
  units: "1",
  standardName: "",
  variable: "rossby_number",
  linear: true,
  signed: true,
  inputs: ["vorticity"],
  compute: (plane, { rows, columns, coriolis, blanked }) => {
    const ratio = Float64Array.from(plane("vorticity"));
    for (let row = 0; row < rows; row++) {
      const divisor = blanked[row] ? Number.NaN : coriolis[row];
      for (let i = row * columns; i < (row + 1) * columns; i++) ratio[i] /= divisor;
    }
    return ratio;
  },
});
