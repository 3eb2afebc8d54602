import {
  approximateRadii,
  type RadiusTable,
  radiusFromTable,
  radiusFromWaveSpeed,
} from "../../jets/scales/deformation-radius";
import type { EarthSettings } from "../../ocean/earth";

/** What a study rests its deformation radius on, with a file already read. */
export type DeformationChoice = "table" | { readonly waveSpeed: number } | { readonly table: RadiusTable };

/** First deformation radius in metres at a latitude in degrees; NaN outside a table. */
export function deformationRadiusAt(choice: DeformationChoice, latitudeDegrees: number, earth: EarthSettings): number {
  if (choice === "table") return radiusFromTable(approximateRadii, latitudeDegrees);
  if ("waveSpeed" in choice) return radiusFromWaveSpeed(choice.waveSpeed, latitudeDegrees, earth);
  return radiusFromTable(choice.table, latitudeDegrees);
}

export function deformationSource(choice: DeformationChoice): "table" | "wave speed" | "file" {
  if (choice === "table") return "table";
  return "waveSpeed" in choice ? "wave speed" : "file";
}
