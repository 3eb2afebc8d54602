import type { ScaleLengths } from "../../model/scales-result";

/** The Rhines scale as a wavelength, and how it is written. */
export const rhinesTitle = "2π√(U/β)";
const convention = "root-wavelength";

/** In metres at the middle latitude, with the speed that the study takes; NaN where unknown. */
export function rhinesWavelength({ rhines, rhinesSpeed }: ScaleLengths): number {
  return rhines[convention]?.[rhinesSpeed] ?? Number.NaN;
}

/** "U 5.4 cm s⁻¹, rms of the eddies" needs the speed itself. */
export function rhinesSpeedOf(lengths: ScaleLengths): number {
  return lengths.rhinesSpeed === "total" ? lengths.totalSpeed : lengths.eddySpeed;
}
