import type { Quantity } from "./define";
import { eastwardVelocity } from "./eastward-velocity";
import { height } from "./height";
import { northwardVelocity } from "./northward-velocity";
import { vorticity } from "./relative-vorticity";
import { rossbyNumber } from "./rossby-number";
import { speed } from "./speed";

/** Every quantity Strake derives, in the order menus show them. */
export const quantities: readonly Quantity[] = [
  height,
  eastwardVelocity,
  northwardVelocity,
  speed,
  vorticity,
  rossbyNumber,
];
