import { Fault } from "../../model/errors";
import type { GridGeometry } from "../grid-geometry";
import type { PlaneLookup, Quantity } from "./define";
import { quantities } from "./index";

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

/** Lazy lookup of every quantity on one height plane: each is computed once, when first asked for. */
export function planesFrom(height: Float64Array, geometry: GridGeometry): PlaneLookup {
  const known = new Map<string, Float64Array>([["height", height]]);
  const lookup: PlaneLookup = (id) => {
    const ready = known.get(id);
    if (ready) return ready;
    const plane = quantityById(id).compute(lookup, geometry);
    known.set(id, plane);
    return plane;
  };
  return lookup;
}
