import type { ColourMap } from "../colour/maps";
import type { Theme } from "../colour/theme";
import { displayUnits } from "../display-units";
import { formatSignificant } from "../format";
import { pathMark, rasterMark, rectanglePath, textMark } from "../marks";
import type { Mark } from "../scene";
import { textWidth } from "../text-width";
import { hairWidth } from "./axis-marks";
import type { LatitudesInput } from "./input";
import type { Box, TypeSizes } from "./layout";

/** The map in which both pictures are painted. */
export function colourMapOf(input: LatitudesInput, theme: Theme): ColourMap {
  return input.quantity.signed ? theme.diverging : theme.sequential;
}

type Limits = readonly [lower: number, upper: number];

/** Limits in display units, to three digits at most. */
export function limitLabels(input: LatitudesInput, [lower, upper]: Limits): [lower: string, upper: string] {
  const { scale } = displayUnits(input.quantity.units);
  return [formatSignificant(lower * scale, 3), formatSignificant(upper * scale, 3)];
}

/** A bar of the colour map with the limits above it, and zero where they straddle it. `id` begins the marks' ids. */
export function colourKeyMarks(
  id: string,
  input: LatitudesInput,
  limits: Limits,
  key: Box,
  sizes: TypeSizes,
  theme: Theme,
): Mark[] {
  const { table } = colourMapOf(input, theme);
  const [lower, upper] = limits;
  const [lowerLabel, upperLabel] = limitLabels(input, limits);
  const base = key.y - 0.45 * sizes.small;
  const style = { size: sizes.small, fill: theme.softInk };
  const marks: Mark[] = [
    rasterMark(`${id}-raster`, key, table.length / 4, 1, table),
    pathMark(`${id}-frame`, rectanglePath(key.x, key.y, key.width, key.height), {
      stroke: theme.rule,
      strokeWidth: hairWidth,
    }),
    textMark(`${id}-lower`, key.x, base, lowerLabel, style),
    textMark(`${id}-upper`, key.x + key.width, base, upperLabel, { ...style, anchor: "end" }),
  ];
  const zero = key.x + (key.width * -lower) / (upper - lower);
  const clearance = textWidth("0", sizes.small, 400) / 2 + 6;
  const hasRoom =
    zero - clearance > key.x + textWidth(lowerLabel, sizes.small, 400) &&
    zero + clearance < key.x + key.width - textWidth(upperLabel, sizes.small, 400);
  if (hasRoom) marks.push(textMark(`${id}-zero`, zero, base, "0", { ...style, anchor: "middle" }));
  return marks;
}
