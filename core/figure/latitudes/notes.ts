import type { Theme } from "../colour/theme";
import { formatCount, formatNumber } from "../format";
import { linePath, pathMark, rectanglePath, textMark } from "../marks";
import type { Mark, PanelFrame } from "../scene";
import { fittingText, textWidth } from "../text-width";
import { dataWidth } from "./axis-marks";
import { hasBlend } from "./blend-bracket";
import { errorsWithin95 } from "./doubtful-cells";
import { filterName, isFiltered, type LatitudesInput } from "./input";
import type { TypeSizes } from "./layout";

const lineShare = 1.6;

/**
 * Under the days with data: what the greys and the amber mean, how many dates hold data, where the numbers come from. Only
 * as many lines as fit above `bottom`.
 */
export function noteMarks(
  input: LatitudesInput,
  days: PanelFrame,
  bottom: number,
  theme: Theme,
  sizes: TypeSizes,
): Mark[] {
  const { small } = sizes;
  const step = lineShare * small;
  const first = days.y + days.height + 1.9 * small;
  const room = Math.max(0, Math.floor((bottom - first) / step) + 1);
  const texts = noteTexts(input);
  // With little room the words matter more than the legend.
  const showsLegend = room > texts.length;
  const marks = showsLegend ? legendMarks(input, days, first, theme, sizes) : [];
  for (const [line, { id, candidates }] of texts.slice(0, room).entries()) {
    const base = first + (line + (showsLegend ? 1 : 0)) * step;
    const style = { size: small, fill: theme.softInk };
    marks.push(textMark(`note-${id}`, days.x, base, fittingText(candidates, days.width, small), style));
  }
  return marks;
}

interface Note {
  readonly id: string;
  /** The longest first. */
  readonly candidates: readonly string[];
}

/** What the reader must know first comes first: a sign that is not explained is worse than a missing count. */
function noteTexts(input: LatitudesInput): Note[] {
  return [
    ...remarks(input),
    { id: "data", candidates: [dataText(input), dataCountText(input)] },
    { id: "source", candidates: [`${input.grid} · ${input.region}`, input.region] },
  ];
}

/** What the hatch and the bracket on the map mean, each where it is drawn. */
function remarks({ record, result, errorSource }: LatitudesInput): Note[] {
  const notes: Note[] = [];
  if (result.error) {
    const under = `hatched: below ${errorsWithin95} standard errors`;
    const source = errorSource ? [`${under} of ${errorSource}`] : [];
    notes.push({ id: "doubt", candidates: [...source, under, "hatched: within its error"] });
  }
  if (hasBlend(record)) {
    notes.push({
      id: "blend",
      candidates: ["rows with a bracket: blended across the equator", "bracket: blended rows", "bracket: blended"],
    });
  }
  return notes;
}

/** The remarks in full, for those who cannot see the signs they explain. */
export function remarkTexts(input: LatitudesInput): string[] {
  return remarks(input).map(({ candidates }) => candidates[0]);
}

function dataCountText({ record }: LatitudesInput): string {
  const held = record.hasData.reduce((sum, has) => sum + (has ? 1 : 0), 0);
  return `${formatCount(held)} of ${formatCount(record.hasData.length)} dates have data`;
}

function dataText(input: LatitudesInput): string {
  if (!isFiltered(input)) return dataCountText(input);
  const lost = formatNumber(input.result.response.daysLostEachEnd, 0);
  return `${dataCountText(input)}, the ${filterName(input.band)} weakens ${lost} days at each end`;
}

/** Swatches with their words, left to right; those that do not fit are left out. */
function legendMarks(
  input: LatitudesInput,
  days: PanelFrame,
  base: number,
  theme: Theme,
  { small }: TypeSizes,
): Mark[] {
  const box = 0.75 * small;
  const swatches = [
    { id: "missing", text: "no value", colour: theme.missing },
    ...(input.record.ocean.includes(0) ? [{ id: "land", text: "land", colour: theme.land }] : []),
    { id: "date", text: input.date, colour: theme.amber },
  ];
  const marks: Mark[] = [];
  let x = days.x;
  for (const { id, text, colour } of swatches) {
    const width = 1.6 * small + textWidth(text, small, 400);
    if (x + width > days.x + days.width) break;
    const swatch =
      id === "date"
        ? pathMark(`legend-${id}-swatch`, linePath(x, base - box / 2, x + 1.2 * small, base - box / 2), {
            stroke: colour,
            strokeWidth: dataWidth + 0.4,
          })
        : pathMark(`legend-${id}-swatch`, rectanglePath(x, base - box, 1.2 * small, box), { fill: colour });
    marks.push(swatch, textMark(`legend-${id}`, x + 1.6 * small, base, text, { size: small, fill: theme.softInk }));
    x += width + 1.6 * small;
  }
  return marks;
}
