import type { ScalesPart } from "../../../core/figure/scales-figure";
import type { Size } from "../../figure/use-size";

export const partChoices: readonly { readonly value: ScalesPart; readonly title: string }[] = [
  { value: "all", title: "All" },
  { value: "lengths", title: "Lengths" },
  { value: "waves", title: "Waves and drift" },
  { value: "forcing", title: "Eddies and jets" },
];

/** Least room in which a part can be read; in less the pane scrolls. */
const leastSizes: Readonly<Record<ScalesPart, Size>> = {
  all: { width: 1240, height: 700 },
  lengths: { width: 720, height: 430 },
  waves: { width: 720, height: 430 },
  forcing: { width: 720, height: 400 },
};

/** What is shown before the person has chosen: all where there is room for it. */
export function partFor({ width, height }: Size): ScalesPart {
  return width >= leastSizes.all.width && height >= leastSizes.all.height ? "all" : "lengths";
}

/** Size of the scene in a pane: the pane's own, or the least the part needs. */
export function sceneSize(pane: Size, part: ScalesPart): Size {
  const least = leastSizes[part];
  return { width: Math.max(pane.width, least.width), height: Math.max(pane.height, least.height) };
}
