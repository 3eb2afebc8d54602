import type { Theme } from "../colour/theme";
import { displayUnits } from "../display-units";
import { counted, formatLongitudeRange, formatSignificant } from "../format";
import { textMark } from "../marks";
import { cellEdges } from "../resample";
import type { Mark } from "../scene";
import { fittingText, textWidth } from "../text-width";
import { isFiltered, type LatitudesInput } from "./input";
import type { LatitudesLayout, TypeSizes } from "./layout";

/** Joins the parts that say something with commas. */
function listed(...parts: readonly string[]): string {
  return parts.filter((part) => part !== "").join(", ");
}

/** "periods 90–540 days", or "all periods" where no filter was at work. */
export function periodsText(input: LatitudesInput): string {
  if (!isFiltered(input)) return "all periods";
  const { shortestDays, longestDays } = input.band;
  if (longestDays === null) return `periods over ${counted(formatSignificant(shortestDays ?? 0, 4), "day")}`;
  if (shortestDays === null) return `periods under ${counted(formatSignificant(longestDays, 4), "day")}`;
  return `periods ${formatSignificant(shortestDays, 4)}–${formatSignificant(longestDays, 4)} days`;
}

export function mapHeading(input: LatitudesInput): string {
  return listed(input.quantity.title, input.date);
}

export function mapSubheading(input: LatitudesInput): string {
  return listed(displayUnits(input.quantity.units).units, periodsText(input));
}

export const pictureHeading = "Zonal mean through time";

/** Bold headings and grey lines over the three panels, each cut to its own panel's width. */
export function rowHeadingMarks(input: LatitudesInput, layout: LatitudesLayout, theme: Theme): Mark[] {
  const { units } = displayUnits(input.quantity.units);
  const [west, east] = cellEdges(input.record.longitude.values);
  const averaged = formatLongitudeRange(west, east);
  const { map, zonalMean, latitudeTime, panelGap } = layout;
  const { heading, small } = layout.sizes;
  const dateIsAbove = textWidth(mapHeading(input), heading, 700) <= map.width;
  const columns = [
    {
      id: "map",
      x: map.x,
      // The layout has kept the colour key clear of the text, or moved it below.
      width: map.width,
      heading: dateIsAbove ? [mapHeading(input)] : [input.quantity.title],
      below: dateIsAbove ? [mapSubheading(input), units] : [listed(input.date, units), input.date],
    },
    {
      id: "zonal-mean",
      x: zonalMean.x,
      width: zonalMean.width + panelGap - heading,
      heading: ["Zonal mean"],
      below: [
        listed(units, "mean of all dates, 95 % band"),
        listed(units, "mean, 95 % band"),
        listed(units, "95 % band"),
        units,
      ],
    },
    {
      id: "latitude-time",
      x: latitudeTime.x,
      width: layout.keysAreBeside ? layout.pictureKey.x - latitudeTime.x - heading : latitudeTime.width,
      heading: [pictureHeading],
      below: [
        listed(units, `averaged over ${averaged}`, periodsText(input)),
        listed(units, `averaged over ${averaged}`),
        listed(units, averaged),
        units,
      ],
    },
  ];
  return columns.flatMap(({ id, x, width, heading: headings, below }) => [
    textMark(`${id}-heading`, x, layout.headingBase, fittingText(headings, width, heading, 700), {
      size: heading,
      weight: 700,
      fill: theme.ink,
    }),
    textMark(`${id}-subheading`, x, layout.subheadingBase, fittingText(below, width, small), {
      size: small,
      fill: theme.softInk,
    }),
  ]);
}

/** A bold heading with a grey remark after it on the same line: the longest of `remarks` that fits, or none. */
export function inlineHeadingMarks(
  id: string,
  place: { readonly x: number; readonly base: number; readonly width: number },
  heading: string,
  remarks: readonly string[],
  theme: Theme,
  sizes: TypeSizes,
): Mark[] {
  const shown = fittingText([heading], place.width, sizes.heading, 700);
  const offset = textWidth(shown, sizes.heading, 700) + sizes.heading;
  const remark = fittingText([...remarks, ""], place.width - offset, sizes.small);
  const marks: Mark[] = [
    textMark(`${id}-heading`, place.x, place.base, shown, { size: sizes.heading, weight: 700, fill: theme.ink }),
  ];
  if (remark !== "") {
    const style = { size: sizes.small, fill: theme.softInk };
    marks.push(textMark(`${id}-subheading`, place.x + offset, place.base, remark, style));
  }
  return marks;
}
