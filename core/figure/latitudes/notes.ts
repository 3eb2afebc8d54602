import type { Theme } from "../colour/theme";
import { counted, formatCount, formatNumber } from "../format";
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
 * Under the days with data: what signs, greys and amber mean, how many dates hold data, where the numbers come from. Only as
 * many lines as fit above `bottom`: what every note must say first, then the legend, then the rest of the notes.
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
  const notes = noteTexts(input);
  const showsLegend = room > notes.length;
  const lines = noteLines(notes.slice(0, room), days.width, small, room - notes.length - 1);
  return [
    ...(showsLegend ? legendMarks(input, days, first, theme, sizes) : []),
    ...lines.map(({ id, text }, line) => {
      const base = first + (line + (showsLegend ? 1 : 0)) * step;
      return textMark(`note-${id}`, days.x, base, text, { size: small, fill: theme.softInk });
    }),
  ];
}

interface Note {
  readonly id: string;
  /** What must be said. */
  readonly main: string;
  /** What follows it on the same line, or on the next one. */
  readonly rest: string;
  readonly between: string;
}

/** The notes as lines: whole where they fit, else their main part, with the rest below it for as many notes as have room. */
function noteLines(notes: readonly Note[], width: number, size: number, spare: number): { id: string; text: string }[] {
  let left = spare;
  return notes.flatMap(({ id, main, rest, between }) => {
    const whole = rest === "" ? main : main + between + rest;
    if (textWidth(whole, size, 400) <= width) return [{ id, text: whole }];
    const lines = [{ id, text: fittingText([main], width, size) }];
    if (rest !== "" && left-- > 0) lines.push({ id: `${id}-rest`, text: fittingText([rest], width, size) });
    return lines;
  });
}

/** What the reader must know first comes first: a sign that is not explained is worse than a missing count. */
function noteTexts(input: LatitudesInput): Note[] {
  return [
    ...remarks(input),
    { id: "data", main: dataCountText(input), between: ", ", rest: endsText(input) },
    { id: "source", main: input.grid, between: " · ", rest: input.region },
  ];
}

/** What the jets' lines, the hatch and the bracket mean, each where it is drawn. */
function remarks({ record, result, errorSource, jets = [] }: LatitudesInput): Note[] {
  const notes: Note[] = [];
  if (jets.length > 0) {
    notes.push({ id: "jets", main: "jets: solid eastward, dashed westward", between: "", rest: "" });
  }
  if (result.error) {
    const rest = errorSource ? `of ${errorSource}` : "";
    notes.push({ id: "doubt", main: `hatched: below ${errorsWithin95} standard errors`, between: " ", rest });
  }
  if (hasBlend(record)) {
    notes.push({ id: "blend", main: "rows with a bracket: blended", between: " ", rest: "across the equator" });
  }
  return notes;
}

/** The remarks in full, for those who cannot see the signs they explain. */
export function remarkTexts(input: LatitudesInput): string[] {
  return remarks(input).map(({ main, between, rest }) => (rest === "" ? main : main + between + rest));
}

function dataCountText({ record }: LatitudesInput): string {
  const held = record.hasData.reduce((sum, has) => sum + (has ? 1 : 0), 0);
  const all = counted(record.hasData.length, "date");
  return `${formatCount(held)} of ${all} ${record.hasData.length === 1 ? "has" : "have"} data`;
}

/** What the filter loses; empty where there was none. */
function endsText(input: LatitudesInput): string {
  if (!isFiltered(input)) return "";
  const lost = formatNumber(input.result.response.daysLostEachEnd, 0);
  return `the ${filterName(input.band)} weakens ${counted(lost, "day")} at each end`;
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
