import { Fault } from "../../model/errors";
import type { GridGeometry } from "../grid-geometry";
import type { PlaneLookup, Quantity } from "./define";
import { quantities } from "./index";
import { intermediates } from "./intermediates";

/** The quantity of that id. Error: Fault "request" naming the known ids. */
export function quantityById(id: string): Quantity {
  const found = quantities.find((quantity) => quantity.id === id);
  if (found) return found;
  throw new Fault({
    tag: "request",
    where: "quantity",
    expected: `one of ${quantities.map((quantity) => quantity.id).join(", ")}`,
    got: `"${id}"`,
    advice: "choose a quantity from the list",
  });
}

/**
 * Lazy lookup of every quantity on one height plane (metres, row-major rows × columns): each is computed once, when first
 * asked for. `anomaly` makes the base plane "height-anomaly": height minus each cell's mean over the period; leave it out
 * where the height has no mean in it, and the height itself is taken. Its constant parts do not matter.
 * Error: Fault "request" for an id that is none of them.
 */
export function planesFrom(
  height: Float64Array,
  geometry: GridGeometry,
  anomaly: () => Float64Array = () => height,
): PlaneLookup {
  const known = new Map<string, Float64Array>([["height", height]]);
  const lookup: PlaneLookup = (id) => {
    const ready = known.get(id);
    if (ready) return ready;
    const made = () => (intermediates[id] ?? quantityById(id).compute)(lookup, geometry);
    const plane = id === "height-anomaly" ? anomaly() : made();
    known.set(id, plane);
    return plane;
  };
  return lookup;
}
