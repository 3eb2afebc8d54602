import { latitudesFigure } from "./latitudes-figure";

/** Every figure Strake draws, in the order menus show them. */
export const figures = [latitudesFigure] as const;

export type FigureId = (typeof figures)[number]["id"];
