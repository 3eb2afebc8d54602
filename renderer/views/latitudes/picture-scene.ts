import type { SpectrumResult } from "../../../core/contract/engine";
import type { Theme } from "../../../core/figure/colour/theme";
import { latitudesScene } from "../../../core/figure/latitudes-figure";
import type { Scene } from "../../../core/figure/scene";
import type { BandSettings } from "../../../core/study/schema";
import type { Size } from "../../figure/use-size";
import type { Picture } from "../../state/bench-state";
import { boxText, gridText } from "../../text/record";
import { quantityText } from "./quantities";
import { dateText } from "./readout";

/** Marks of the scene that stand where the person last let go; on screen the overlay draws them where they are held. */
export const heldMarks: ReadonlySet<string> = new Set(["latitude-time-date", "days-date", "spectrum-edges"]);

/**
 * The scene of a picture. `band` is the band as it is held now: its edges move at once, while field and response follow
 * with the next result. A spectrum of another quantity is left out.
 */
export function pictureScene(
  picture: Picture,
  spectrum: SpectrumResult | null,
  band: BandSettings,
  size: Size,
  theme: Theme,
): Scene {
  const { record, result, open, grid } = picture;
  return latitudesScene(
    {
      record,
      result,
      spectrum: spectrum?.quantity === result.choice.quantity ? spectrum : undefined,
      quantity: quantityText(result.choice.quantity),
      band,
      region: boxText(record),
      grid: gridText(open.study, grid, record),
      date: dateText(picture, result.dateIndex),
    },
    size,
    theme,
  );
}
