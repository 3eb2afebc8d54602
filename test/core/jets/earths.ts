import type { EarthSettings } from "../../../core/ocean/earth";

/** The sphere on which analytic cases are written. */
export const sphere: EarthSettings = { earth: "sphere", radius: 6371000, gravity: 9.81, omega: 7.292115e-5 };
export const ellipsoid: EarthSettings = { ...sphere, earth: "ellipsoid" };
