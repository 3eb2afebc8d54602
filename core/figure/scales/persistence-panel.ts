import { paint } from "../colour/paint";
import { formatSignificant } from "../format";
import { bottomTickMarks, frameMark, roomiestTicks } from "../latitudes/axis-marks";
import { rasterMark } from "../marks";
import type { PanelFrame } from "../scene";
import { longitudeTicks } from "../ticks";
import { colourKey, headingMark, missingPanel, type PanelMarks, subheadingMark } from "./cell-marks";
import { heldMarks } from "./held-latitude";
import type { Drawing } from "./input";
import type { Cell } from "./layout";
import { outerEdges, reachAcross, shownCells } from "./spans";

/** Of two signs one has half of the dates at least. */
const limits = [0.5, 1] as const;
const heading = "Persistence";
const meaning = "share of dates with the prevailing sign";

/** Map of the share of dates on which u has the sign that it has most often, on the profiles' latitude axis. */
export function persistencePanel(cell: Cell, drawing: Drawing): PanelMarks {
  const { input, sizes, theme } = drawing;
  const { share } = input.result.persistence;
  if (!share.values.some(Number.isFinite)) return missingPanel(cell, heading, "No cell has values.", drawing);
  const { latitude } = input.result;
  const [south, north] = outerEdges(latitude);
  const [west, east] = outerEdges(input.longitude);
  const panel: PanelFrame = {
    id: cell.id,
    ...cell.frame,
    horizontal: { kind: "longitude", from: west, to: east },
    vertical: { kind: "latitude", from: north, to: south },
  };
  const whole = `${heading}: ${meaning}`;
  const key = colourKey(cell, theme.sequential.table, ["0.5", "1"], [whole, heading], drawing);
  const { columns, rows, pixels } = picture(panel, drawing);
  const ticks = roomiestTicks(panel, (most) => longitudeTicks(west, east, most), sizes, sizes.small);
  return {
    panels: [panel],
    marks: [
      headingMark(cell, key.headings, drawing, key.taken),
      ...key.marks,
      subheadingMark(cell, remarks(key.headings[0] === whole, drawing), drawing),
      rasterMark(`${cell.id}-raster`, panel, columns, rows, pixels),
      ...heldMarks(panel, drawing),
      frameMark(panel, theme),
      ...bottomTickMarks(panel, ticks, reachAcross(cell), theme, sizes),
    ],
  };
}

/** What was counted; what the colours mean, where the heading leaves it out. */
function remarks(isTold: boolean, { input }: Drawing): string[] {
  const { inBand, stepDays } = input.result.persistence;
  const counted = inBand && input.band !== "" ? `u in ${input.band}` : "u";
  const every = stepDays === 1 ? "a map every day" : `a map every ${formatSignificant(stepDays, 3)} days`;
  if (isTold) return [`${counted}; ${every}`, counted];
  return [`${meaning}; ${counted}`, meaning, "share of dates with one sign"];
}

/** The share as a raster with north at the top; land in its own grey, what lies between far columns as missing. */
function picture(panel: PanelFrame, { input, theme }: Drawing) {
  const { values, columns: stride } = input.result.persistence.share;
  const { horizontal, vertical } = panel;
  const across = shownCells(input.longitude, horizontal.from, horizontal.to, panel.width);
  const up = shownCells(input.result.latitude, vertical.from, vertical.to, panel.height);
  const shown = new Float32Array(across.length * up.length).fill(Number.NaN);
  const ocean = new Uint8Array(shown.length).fill(1);
  up.forEach((row, i) => {
    across.forEach((column, j) => {
      if (row < 0 || column < 0) return;
      const [cell, pixel] = [row * stride + column, i * across.length + j];
      shown[pixel] = values[cell];
      ocean[pixel] = input.ocean[cell];
    });
  });
  const blank = { missing: theme.missing, land: theme.land, ocean };
  return { columns: across.length, rows: up.length, pixels: paint(shown, limits, theme.sequential, blank) };
}
