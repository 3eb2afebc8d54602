import type { ColourMap } from "../colour/maps";
import type { Theme } from "../colour/theme";
import { displayUnits } from "../display-units";
import { formatSignificant } from "../format";
import { pathMark, rasterMark, rectanglePath, textMark } from "../marks";
import type { Mark } from "../scene";
import { textWidth } from "../text-width";
import { hairWidth } from "./axis-marks";
import type { LatitudesInput } from "./input";
import type { LatitudesLayout } from "./layout";

/** The map in which both pictures are painted. */
export function colourMapOf(input: LatitudesInput, theme: Theme): ColourMap {
  return input.quantity.signed ? theme.diverging : theme.sequential;
}

/** The limits in display units, to three digits at most. */
export function limitLabels(input: LatitudesInput): [lower: string, upper: string] {
  const { scale } = displayUnits(input.quantity.units);
  const [lower, upper] = input.result.limits;
  return [formatSignificant(lower * scale, 3), formatSignificant(upper * scale, 3)];
}

/** A bar of the colour map with its limits above it, and zero where the limits straddle it. */
export function colourKeyMarks(input: LatitudesInput, layout: LatitudesLayout, theme: Theme): Mark[] {
  const { key, sizes } = layout;
  const { table } = colourMapOf(input, theme);
  const [lower, upper] = input.result.limits;
  const [lowerLabel, upperLabel] = limitLabels(input);
  const base = key.y - 0.45 * sizes.small;
  const style = { size: sizes.small, fill: theme.softInk };
  const marks: Mark[] = [
    rasterMark("key-raster", key, table.length / 4, 1, table),
    pathMark("key-frame", rectanglePath(key.x, key.y, key.width, key.height), {
      stroke: theme.rule,
      strokeWidth: hairWidth,
    }),
    textMark("key-lower", key.x, base, lowerLabel, style),
    textMark("key-upper", key.x + key.width, base, upperLabel, { ...style, anchor: "end" }),
  ];
  const zero = key.x + (key.width * -lower) / (upper - lower);
  const clearance = textWidth("0", sizes.small, 400) / 2 + 6;
  const hasRoom =
    zero - clearance > key.x + textWidth(lowerLabel, sizes.small, 400) &&
    zero + clearance < key.x + key.width - textWidth(upperLabel, sizes.small, 400);
  if (hasRoom) marks.push(textMark("key-zero", zero, base, "0", { ...style, anchor: "middle" }));
  return marks;
}
