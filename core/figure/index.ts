import { latitudesFigure } from "./latitudes-figure";
import { scalesFigure } from "./scales-figure";

/** Every figure Strake draws, in the order menus show them. */
export const figures = [latitudesFigure, scalesFigure] as const;

export type FigureId = (typeof figures)[number]["id"];
