import type { SpectrumResult } from "../../../core/contract/engine";
import type { Theme } from "../../../core/figure/colour/theme";
import { latitudesScene } from "../../../core/figure/latitudes-figure";
import { boxText, errorSourceText } from "../../../core/figure/record-text";
import type { Scene } from "../../../core/figure/scene";
import type { BandSettings } from "../../../core/study/schema";
import type { Size } from "../../figure/use-size";
import type { Picture } from "../../state/bench-state";
import type { FoundJets } from "../../state/jets-state";
import { gridTitle } from "../../text/record";
import { drawnJets } from "./jets/drawn-jets";
import { quantityText } from "./quantities";
import { dateText } from "./readout";

/** Marks of the scene that stand where the person last let go; on screen the overlay draws them where they are held. */
export const heldMarks: ReadonlySet<string> = new Set(["latitude-time-date", "days-date", "spectrum-edges"]);

/** What a scene shows beside the picture, as it is now: it may have changed since the picture was computed. */
export interface Surroundings {
  /** The band as it is held: its edges move at once, while field and response follow with the next result. */
  readonly band: BandSettings;
  /** One of another quantity is left out. */
  readonly spectrum: SpectrumResult | null;
  /** Why there is no spectrum; empty where there is one, or it is still being computed. */
  readonly noSpectrum: string;
  readonly blendedRows: Uint8Array | null;
  readonly found: FoundJets | null;
  readonly selectedJet: number | null;
}

/** The scene of a picture. */
export function pictureScene(picture: Picture, around: Surroundings, size: Size, theme: Theme): Scene {
  const { result, open, grid } = picture;
  const { band, spectrum, noSpectrum, blendedRows, selectedJet } = around;
  const jets = drawnJets(picture, around.found);
  const record = blendedRows ? { ...picture.record, blendedRows } : picture.record;
  return latitudesScene(
    {
      record,
      result,
      spectrum: spectrum?.quantity === result.choice.quantity ? spectrum : undefined,
      ...(noSpectrum === "" ? {} : { spectrumNote: noSpectrum }),
      ...(result.error ? { errorSource: errorSourceText(open.study.errors) } : {}),
      ...(jets ? { jets, selectedJet } : {}),
      quantity: quantityText(result.choice.quantity),
      // Words and response are those of the result; only what is held runs ahead.
      band: open.study.band,
      heldBand: band,
      region: boxText(record),
      grid: gridTitle(open.study, grid, record),
      date: dateText(picture, result.dateIndex),
    },
    size,
    theme,
  );
}
