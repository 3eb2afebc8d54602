import type { Estimate, RulerLength } from "../../model/scales-result";
import { bottomTickMarks, dataWidth, hairWidth, roomiestTicks } from "../latitudes/axis-marks";
import { linePath, pathMark, rectanglePath, textMark } from "../marks";
import { pixelX } from "../panel";
import type { Mark, PanelFrame } from "../scene";
import { fittingText, textWidth } from "../text-width";
import { linearTicks } from "../ticks";
import { headingMark, missingPanel, type PanelMarks, subheadingMark } from "./cell-marks";
import { estimateText } from "./estimate-text";
import type { Drawing } from "./input";
import type { Cell } from "./layout";
import { reachAcross } from "./spans";

const heading = "Lengths on one ruler";
const headroom = 1.06;
const bar = 4;
/** A row takes at least this many small type sizes beside its bar. */
const leastRow = 1.32;
/** Names for narrow rulers. */
const shortTitles: Readonly<Record<string, string>> = {
  peak: "u of each map",
  "mean-peak": "u of the mean",
  deformation: "π × deformation",
  resolved: "Mapping resolves",
  grid: "Grid resolves",
};
/** What is left out first where there is no room for all. */
const leastNeeded = ["grid", "mean-peak", "band-spacing", "rhines-two", "peak", "resolved", "deformation"];

/** Half-wavelengths as thin bars under their names, measured ones dark, with whiskers where their limits are known. */
export function rulerPanel(cell: Cell, drawing: Drawing): PanelMarks {
  const { input, sizes, theme } = drawing;
  const { small } = sizes;
  const all = input.result.lengths.ruler;
  if (all.length === 0) return missingPanel(cell, heading, "No length could be told from this record.", drawing);
  const { y, height } = cell.frame;
  const rows = named(
    fittingRows(all, Math.max(1, Math.floor(height / (leastRow * small + bar)))),
    cell.frame.width,
    drawing,
  );
  const most = Math.max(...rows.map(({ halfWavelength: { value, high95 } }) => Math.max(value, high95 || 0)));
  const panel: PanelFrame = {
    id: cell.id,
    ...cell.frame,
    horizontal: { kind: "linear", from: 0, to: headroom * most },
    vertical: { kind: "linear", from: 0, to: rows.length },
  };
  const pitch = Math.min(height / rows.length, 2.6 * small);
  const bottom = y + height;
  const ticks = roomiestTicks(
    panel,
    (count) =>
      linearTicks(0, (headroom * most) / 1000, count).map((tick) => ({
        value: 1000 * tick.value,
        label: `${tick.label} km`,
      })),
    sizes,
    1.2 * small,
  );
  return {
    panels: [],
    marks: [
      headingMark(cell, [heading, "Lengths"], drawing),
      subheadingMark(
        cell,
        [
          "half-wavelengths: from an eastward core to the next westward one",
          "half-wavelengths, core to next core",
          "half-wavelengths",
        ],
        drawing,
      ),
      ...ticks.map(({ value }, index) => {
        const x = pixelX(panel, value);
        return pathMark(`ruler-grid-${index}`, linePath(x, y, x, bottom), {
          stroke: theme.rule,
          strokeWidth: hairWidth,
        });
      }),
      ...rows.flatMap((length, index) => rowMarks(panel, length, y + index * pitch, pitch, drawing)),
      ...bottomTickMarks(panel, ticks, reachAcross(cell), theme, sizes),
    ],
  };
}

function fittingRows(all: readonly RulerLength[], room: number): readonly RulerLength[] {
  let kept = all;
  for (const id of leastNeeded) {
    if (kept.length <= room) break;
    kept = kept.filter((length) => length.id !== id);
  }
  return kept.slice(0, room);
}

/** Short names for all where a full one would not fit beside its value. */
function named(rows: readonly RulerLength[], width: number, { sizes }: Drawing): readonly RulerLength[] {
  const { small } = sizes;
  const fits = rows.every(
    ({ title, halfWavelength }) =>
      textWidth(title, small, 400) + small + textWidth(valueText(halfWavelength), small, 700) <= width,
  );
  return fits ? rows : rows.map((length) => ({ ...length, title: shortTitles[length.id] ?? length.title }));
}

function valueText(length: Estimate): string {
  return `${estimateText(length, 0.001)} km`;
}

/** Colours by what a length is: seen in the maps, from theory, or a limit of what can be seen. */
function barColour(id: string, { theme }: Drawing): string {
  if (id.startsWith("rhines") || id === "deformation") return theme.amber;
  return id === "resolved" || id === "grid" ? theme.hatch : theme.ink;
}

function rowMarks(panel: PanelFrame, length: RulerLength, top: number, pitch: number, drawing: Drawing): Mark[] {
  const { sizes, theme } = drawing;
  const { small } = sizes;
  const { id, title, halfWavelength } = length;
  const base = top + Math.max(0.86 * small, pitch - bar - 0.42 * small);
  const value = valueText(halfWavelength);
  const valueWidth = textWidth(value, small, 700);
  const right = panel.x + panel.width;
  const shown = fittingText([title], panel.width - valueWidth - small, small);
  const end = pixelX(panel, halfWavelength.value);
  const barTop = base + 0.34 * small;
  const ground = (mark: string, x: number, width: number) =>
    pathMark(`ruler-${id}-${mark}`, rectanglePath(x, base - 0.78 * small, width, 1.02 * small), { fill: theme.ground });
  return [
    ground("ground", panel.x, textWidth(shown, small, 400) + 3),
    textMark(`ruler-${id}`, panel.x, base, shown, { size: small, fill: theme.ink }),
    ground("value-ground", right - valueWidth - 3, valueWidth + 3),
    textMark(`ruler-${id}-value`, right, base, value, { size: small, weight: 700, fill: theme.ink, anchor: "end" }),
    pathMark(`ruler-${id}-bar`, rectanglePath(panel.x, barTop, end - panel.x, bar), { fill: barColour(id, drawing) }),
    ...whiskers(panel, length, barTop, drawing),
  ];
}

function whiskers(panel: PanelFrame, { id, halfWavelength }: RulerLength, barTop: number, { theme }: Drawing): Mark[] {
  const { low95, high95 } = halfWavelength;
  if (!(high95 > low95)) return [];
  const [left, right, middle] = [pixelX(panel, Math.max(0, low95)), pixelX(panel, high95), barTop + bar / 2];
  const [top, bottom] = [barTop - 1.5, barTop + bar + 1.5];
  const d =
    linePath(left, middle, right, middle) + linePath(left, top, left, bottom) + linePath(right, top, right, bottom);
  return [pathMark(`ruler-${id}-limits`, d, { stroke: theme.softInk, strokeWidth: dataWidth })];
}
