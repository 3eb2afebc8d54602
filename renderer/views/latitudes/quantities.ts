import { quantities } from "../../../core/ocean/quantities/index";

/** Title and SI units of a quantity; an id this version does not know shows as itself. */
export function quantityText(id: string): { readonly title: string; readonly units: string; readonly signed: boolean } {
  return quantities.find((quantity) => quantity.id === id) ?? { title: id, units: "", signed: true };
}
