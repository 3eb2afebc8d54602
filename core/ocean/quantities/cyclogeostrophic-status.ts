import { balance } from "../cyclogeostrophy";
import { defineQuantity } from "./define";

/**
 * How the cyclogeostrophic iteration ended: 1 settled, 2 frozen because its change grew, 3 no balance exists there (the
 * value is the one it was frozen at), 4 still changing. NaN where u or v is.
 */
export const cyclogeostrophicStatus = defineQuantity({
  id: "cyclogeostrophic-status",
  title: "Cyclogeostrophic status",
  units: "1",
  standardName: "",
  variable: "cyclogeostrophic_status",
  linear: false,
  signed: false,
  inputs: ["u-cyclogeostrophic"],
  compute: (plane) =>
    plane("cyclogeostrophic-flow")
      .slice(2 * plane("u").length)
      .map((status) => (status === balance.none ? Number.NaN : status)),
});
