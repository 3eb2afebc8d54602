import type { Drift } from "../../model/scales-result";
import { paint } from "../colour/paint";
import { formatLatitude, formatNumber } from "../format";
import { bottomTickMarks, dataWidth, frameMark, leftTickMarks, roomiestTicks } from "../latitudes/axis-marks";
import { linePath, rasterMark } from "../marks";
import { pixelX, pixelY } from "../panel";
import type { Mark, PanelFrame, PanelScale } from "../scene";
import { latitudeTicks, longitudeTicks } from "../ticks";
import { timeTicks } from "../time-ticks";
import {
  casedLine,
  chipMarks,
  colourKey,
  headingMark,
  missingPanel,
  type PanelMarks,
  subheadingMark,
} from "./cell-marks";
import { estimateText } from "./estimate-text";
import { heldMarks } from "./held-latitude";
import type { Drawing } from "./input";
import type { Cell } from "./layout";
import { missingReason } from "./missing";
import { fitsAcross, fitsUp, labelsUp, outerEdges, reachAcross, shownCells } from "./spans";

const metresInDegree = 111_195;
const secondsInDay = 86_400;
/** Magnitudes beyond this share of all take the end colours. */
const limitShare = 0.98;
const quantities: Readonly<Record<string, string>> = {
  u: "eastward velocity",
  v: "northward velocity",
  height: "height",
  vorticity: "relative vorticity",
};

/** Longitude across, time up, and the line that the pattern follows. */
export function driftAlongPanel(cell: Cell, drawing: Drawing): PanelMarks {
  const { result, calendar } = drawing.input;
  const { alongLatitude: drift } = result.drift;
  const heading = `Drift along ${formatLatitude(result.alongLatitude, 1)}`;
  if (!drift) return missingPanel(cell, heading, missingReason(result, "along"), drawing);
  const headings = [heading, `Along ${formatLatitude(result.alongLatitude, 1)}`];
  const { longWave } = result.waves;
  const [west, east] = outerEdges(drift.position);
  const [first, last] = outerEdges(drift.days);
  const panel: PanelFrame = {
    id: cell.id,
    ...cell.frame,
    horizontal: { kind: "longitude", from: west, to: east },
    vertical: { kind: "time", from: last, to: first },
  };
  const perDay = secondsInDay / (metresInDegree * Math.cos((result.alongLatitude * Math.PI) / 180));
  const name = quantityName(drift);
  const wave = Number.isFinite(longWave) ? `long Rossby wave ${formatNumber(100 * longWave, 1)} cm s⁻¹` : "";
  const remarks =
    wave === ""
      ? [`${name}; time runs up`]
      : [`${name}, time runs up; ${wave}`, `${name}; ${wave}`, `time runs up; ${wave}`, wave];
  const ticks = roomiestTicks(panel, (most) => longitudeTicks(west, east, most), drawing.sizes, drawing.sizes.small);
  return drawn({
    cell,
    drawing,
    drift,
    panel,
    headings,
    remarks,
    line: (speed) => {
      const [middleX, middleT] = [(west + east) / 2, (first + last) / 2];
      const at = (day: number) => middleX + speed * perDay * (day - middleT);
      return linePath(pixelX(panel, at(first)), pixelY(panel, first), pixelX(panel, at(last)), pixelY(panel, last));
    },
    across: ticks,
    up: timeTicks(calendar, first, last, fitsUp(panel, cell, drawing)),
    timeRunsUp: true,
  });
}

/** Time across, latitude up, and the line that the pattern follows. */
export function driftAcrossPanel(cell: Cell, drawing: Drawing): PanelMarks {
  const { result, calendar } = drawing.input;
  const { acrossLatitudes: drift } = result.drift;
  const heading = "Drift across latitudes";
  if (!drift) return missingPanel(cell, heading, missingReason(result, "across"), drawing);
  const headings = [heading, "Drift northward"];
  const [south, north] = outerEdges(drift.position);
  const [first, last] = outerEdges(drift.days);
  const panel: PanelFrame = {
    id: cell.id,
    ...cell.frame,
    horizontal: { kind: "time", from: first, to: last },
    vertical: { kind: "latitude", from: north, to: south },
  };
  const name = quantityName(drift);
  const { band } = drawing.input;
  return drawn({
    cell,
    drawing,
    drift,
    panel,
    headings,
    remarks: [
      ...(band === "" ? [] : [`zonal mean of ${name}, ${band}`, `zonal-mean ${drift.quantity}, ${band}`]),
      `zonal mean of ${name}`,
      `zonal-mean ${drift.quantity}`,
    ],
    line: (speed) => {
      const [middleY, middleT] = [(south + north) / 2, (first + last) / 2];
      const at = (day: number) => middleY + ((speed * secondsInDay) / metresInDegree) * (day - middleT);
      return linePath(pixelX(panel, first), pixelY(panel, at(first)), pixelX(panel, last), pixelY(panel, at(last)));
    },
    across: timeTicks(calendar, first, last, fitsAcross(panel, drawing)),
    up: latitudeTicks(south, north, labelsUp(cell, drawing)),
    timeRunsUp: false,
    over: heldMarks(panel, drawing),
  });
}

interface DriftParts {
  readonly cell: Cell;
  readonly drawing: Drawing;
  readonly drift: Drift;
  readonly panel: PanelFrame;
  readonly headings: readonly string[];
  readonly remarks: readonly string[];
  /** Path of a speed in m s-1 through the middle of the panel. */
  readonly line: (speed: number) => string;
  readonly across: Parameters<typeof bottomTickMarks>[1];
  readonly up: Parameters<typeof leftTickMarks>[1];
  readonly timeRunsUp: boolean;
  readonly over?: readonly Mark[];
}

function drawn(parts: DriftParts): PanelMarks {
  const { cell, drawing, drift, panel, headings, remarks, line, across, up, timeRunsUp, over = [] } = parts;
  const { sizes, theme } = drawing;
  const limit = usualLimit(drift.picture.values);
  const { columns, rows, pixels } = picture(drift, panel, timeRunsUp, limit, drawing);
  const { speed } = drift;
  const unit = (value: number) => formatNumber(100 * value, limit >= 0.1 ? 0 : 1);
  const key = colourKey(cell, theme.diverging.table, [unit(-limit), `${unit(limit)} cm s⁻¹`], headings, drawing);
  const style = { stroke: theme.amber, strokeWidth: dataWidth + 0.6 };
  const limits = [speed.low95, speed.high95].filter(Number.isFinite).map(line).join("");
  return {
    panels: [panel],
    marks: [
      headingMark(cell, key.headings, drawing, key.taken),
      ...key.marks,
      subheadingMark(cell, remarks, drawing),
      rasterMark(`${cell.id}-raster`, panel, columns, rows, pixels),
      ...casedLine(`${cell.id}-limits`, limits, { ...style, strokeWidth: dataWidth, dash: [3, 3] }, panel.id, theme),
      ...casedLine(`${cell.id}-line`, line(speed.value), style, panel.id, theme),
      ...over,
      ...chipMarks(`${cell.id}-speed`, panel, "top left", `${estimateText(speed, 100)} cm s⁻¹`, drawing, {
        weight: 700,
        fill: theme.amberInk,
      }),
      frameMark(panel, theme),
      ...bottomTickMarks(panel, across, reachAcross(cell), theme, sizes),
      ...leftTickMarks(panel, up, theme, sizes),
    ],
  };
}

function quantityName({ quantity }: Drift): string {
  return quantities[quantity] ?? quantity;
}

/** The picture as a raster: positions across and times up, or times across and positions up. */
function picture(
  { picture: { columns: dates, values }, position, days }: Drift,
  panel: PanelFrame,
  timeRunsUp: boolean,
  limit: number,
  { theme }: Drawing,
): { columns: number; rows: number; pixels: Uint8ClampedArray } {
  const cells = (centres: Float64Array, { from, to }: PanelScale, pixels: number) =>
    shownCells(centres, from, to, pixels);
  const across = cells(timeRunsUp ? position : days, panel.horizontal, panel.width);
  const up = cells(timeRunsUp ? days : position, panel.vertical, panel.height);
  const shown = new Float32Array(across.length * up.length);
  for (let row = 0; row < up.length; row++) {
    for (let column = 0; column < across.length; column++) {
      const [place, date] = timeRunsUp ? [across[column], up[row]] : [up[row], across[column]];
      shown[row * across.length + column] = place < 0 || date < 0 ? Number.NaN : values[place * dates + date];
    }
  }
  return {
    columns: across.length,
    rows: up.length,
    pixels: paint(shown, [-limit, limit], theme.diverging, { missing: theme.missing }),
  };
}

/** Magnitude that 98 % of the values stay under. */
function usualLimit(values: Float32Array): number {
  const sizes = values
    .filter((value) => !Number.isNaN(value))
    .map(Math.abs)
    .sort();
  return sizes[Math.floor(limitShare * (sizes.length - 1))] || 1;
}
