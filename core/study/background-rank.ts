import { Fault } from "../model/errors";
import { addToNormal, type BackgroundBasis, solveBackground } from "../numeric/background";
import type { HeightRecord } from "./record";

/** Why the record's dates cannot carry the background asked for, or null where they can. */
export function backgroundFault(basis: BackgroundBasis, { hasData }: HeightRecord): Fault | null {
  const terms = basis.names.length;
  if (terms === 0) return null;
  const normal = new Float64Array(terms * terms);
  let dates = 0;
  hasData.forEach((flag, t) => {
    if (!flag) return;
    dates++;
    addToNormal(normal, basis, t, 1);
  });
  if (dates >= terms && !Number.isNaN(solveBackground(normal, new Float64Array(terms), dates)[0])) return null;
  return new Fault({
    tag: "period",
    where: "background",
    expected: `dates enough to tell ${terms} terms apart (${basis.names.join(", ")})`,
    got: `${dates} ${dates === 1 ? "date" : "dates"} with data`,
    advice: "choose a longer period, or switch terms of the background off",
  });
}
