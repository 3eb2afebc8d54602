import type { Theme } from "../colour/theme";
import { frameMark, groundMark, hairWidth } from "../latitudes/axis-marks";
import { linePath, pathMark, rasterMark, rectanglePath, textMark } from "../marks";
import type { Mark, PanelFrame } from "../scene";
import { fittingText, textWidth } from "../text-width";
import type { Drawing } from "./input";
import type { Cell } from "./layout";
import { wrapText } from "./wrap-text";

/** What one panel adds to the scene. */
export interface PanelMarks {
  readonly marks: readonly Mark[];
  readonly panels: readonly PanelFrame[];
}

/** Bold heading over a cell; of the candidates the first that leaves `taken` pixels at the right free. */
export function headingMark(cell: Cell, candidates: readonly string[], drawing: Drawing, taken = 0): Mark {
  const { heading } = drawing.sizes;
  const text = fittingText(candidates, cell.frame.width - taken, heading, 700);
  const style = { size: heading, weight: 700, fill: drawing.theme.ink } as const;
  return textMark(`${cell.id}-heading`, cell.frame.x, cell.headingBase, text, style);
}

/** Grey line under the heading: the longest of the candidates that fits. */
export function subheadingMark(cell: Cell, candidates: readonly string[], drawing: Drawing): Mark {
  const { small } = drawing.sizes;
  const text = fittingText(candidates, cell.frame.width, small);
  const style = { size: small, fill: drawing.theme.softInk };
  return textMark(`${cell.id}-subheading`, cell.frame.x, cell.subheadingBase, text, style);
}

export interface LegendEntry {
  readonly id: string;
  readonly text: string;
  /** Stands in where there is little room. */
  readonly short?: string;
  readonly stroke: string;
  readonly strokeWidth: number;
  readonly dash?: readonly number[];
}

/** Lines with their words under the heading, in place of a grey line: in short where they would not fit, the last left out. */
export function legendMarks(cell: Cell, entries: readonly LegendEntry[], { sizes, theme }: Drawing): Mark[] {
  const { small } = sizes;
  const sample = 1.5 * small;
  const space = 0.4 * small;
  const gap = small;
  const total = (texts: readonly string[]) =>
    texts.reduce((sum, text) => sum + sample + space + textWidth(text, small, 400) + gap, -gap);
  const long = entries.map(({ text }) => text);
  const isLong = total(long) <= cell.frame.width;
  const texts = isLong ? long : entries.map(({ text, short }) => short ?? text);
  const right = cell.frame.x + cell.frame.width;
  const marks: Mark[] = [];
  let x = cell.frame.x;
  for (const [index, { id, stroke, strokeWidth, dash }] of entries.entries()) {
    const width = sample + space + textWidth(texts[index], small, 400);
    if (x + width > right) break;
    const y = cell.subheadingBase - 0.32 * small;
    marks.push(
      pathMark(`${cell.id}-legend-${id}-line`, linePath(x, y, x + sample, y), {
        stroke,
        strokeWidth,
        ...(dash ? { dash } : {}),
      }),
      textMark(`${cell.id}-legend-${id}`, x + sample + space, cell.subheadingBase, texts[index], {
        size: small,
        fill: theme.softInk,
      }),
    );
    x += width + gap;
  }
  return marks;
}

export interface ColourKey {
  readonly marks: readonly Mark[];
  /** Pixels that it takes of the heading's line. */
  readonly taken: number;
  /** The headings that leave it that room; all of them where there is no key. */
  readonly headings: readonly string[];
}

/** A small bar of colours at the right end of the heading's line with its limits on either side, where any heading leaves room. */
export function colourKey(
  cell: Cell,
  table: Uint8ClampedArray,
  limits: readonly [lower: string, upper: string],
  headings: readonly string[],
  { sizes, theme }: Drawing,
): ColourKey {
  const { heading, small } = sizes;
  const [lower, upper] = limits.map((text) => textWidth(text, small, 400));
  const bar = Math.round(3 * small);
  const gap = 0.45 * small;
  const taken = lower + upper + bar + 2 * gap + heading;
  const fitting = headings.filter((text) => textWidth(text, heading, 700) + taken <= cell.frame.width);
  if (fitting.length === 0) return { marks: [], taken: 0, headings };
  const right = cell.frame.x + cell.frame.width;
  const box = {
    x: Math.round(right - upper - gap - bar),
    y: Math.round(cell.headingBase - 0.62 * small),
    width: bar,
    height: Math.round(0.6 * small),
  };
  const style = { size: small, fill: theme.softInk, anchor: "end" } as const;
  return {
    taken,
    headings: fitting,
    marks: [
      textMark(`${cell.id}-key-lower`, box.x - gap, cell.headingBase, limits[0], style),
      rasterMark(`${cell.id}-key`, box, table.length / 4, 1, table),
      pathMark(`${cell.id}-key-frame`, rectanglePath(box.x, box.y, box.width, box.height), {
        stroke: theme.rule,
        strokeWidth: hairWidth,
      }),
      textMark(`${cell.id}-key-upper`, right, cell.headingBase, limits[1], style),
    ],
  };
}

/** A line over colours: on a wider one of the panel's ground, so that it stands out on light and dark cells alike. */
export function casedLine(
  id: string,
  d: string,
  style: { readonly stroke: string; readonly strokeWidth: number; readonly dash?: readonly number[] },
  clip: string,
  theme: Theme,
): Mark[] {
  if (d === "") return [];
  return [
    pathMark(`${id}-casing`, d, { stroke: theme.panel, strokeWidth: style.strokeWidth + 2, clip }),
    pathMark(id, d, { ...style, clip }),
  ];
}

/** A short text on a ground of its own over colours, in a corner of a panel; nothing where it does not fit. */
export function chipMarks(
  id: string,
  panel: PanelFrame,
  corner: "top left" | "top right" | "bottom left",
  text: string,
  { sizes, theme }: Drawing,
  style: { readonly weight: 400 | 700; readonly fill: string } = { weight: 400, fill: theme.softInk },
): Mark[] {
  const { small } = sizes;
  const [across, height] = [0.5 * small, Math.round(1.55 * small)];
  const width = textWidth(text, small, style.weight) + 2 * across;
  const edge = Math.round(0.5 * small);
  if (width + 2 * edge > panel.width || height + 2 * edge > panel.height) return [];
  const x = corner === "top right" ? panel.x + panel.width - edge - width : panel.x + edge;
  const y = corner !== "bottom left" ? panel.y + edge : panel.y + panel.height - edge - height;
  return [
    pathMark(`${id}-ground`, rectanglePath(x, y, width, height), { fill: theme.panel }),
    textMark(id, x + across, y + 1.1 * small, text, { size: small, ...style }),
  ];
}

/** A frame that says in words why nothing is in it. */
export function missingPanel(cell: Cell, heading: string, reason: string, drawing: Drawing): PanelMarks {
  const { sizes, theme } = drawing;
  const { small } = sizes;
  const panel = blankPanel(cell);
  const lines = wrapText(
    reason,
    cell.frame.width - 2 * small,
    small,
    Math.floor(cell.frame.height / (1.4 * small)) - 1,
  );
  const first = cell.frame.y + cell.frame.height / 2 - (lines.length / 2) * 1.4 * small + small;
  return {
    panels: [],
    marks: [
      headingMark(cell, [heading], drawing),
      groundMark(panel, theme),
      ...lines.map((line, index) =>
        textMark(`${cell.id}-missing-${index}`, cell.frame.x + small, first + 1.4 * index * small, line, {
          size: small,
          fill: theme.softInk,
        }),
      ),
      frameMark(panel, theme),
    ],
  };
}

function blankPanel(cell: Cell): PanelFrame {
  const scale = { kind: "linear", from: 0, to: 1 } as const;
  return { id: cell.id, ...cell.frame, horizontal: scale, vertical: scale };
}
