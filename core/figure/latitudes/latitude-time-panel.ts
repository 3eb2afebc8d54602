import { paint } from "../colour/paint";
import type { Theme } from "../colour/theme";
import { linePath, pathMark, rasterMark } from "../marks";
import { pixelX } from "../panel";
import { cellEdges, gatherCells, nearestCellsOrGaps, usualSpacing } from "../resample";
import type { Mark, PanelFrame } from "../scene";
import { timeTicks } from "../time-ticks";
import { bottomTickMarks, dataWidth, frameMark, labelsKeepApart, mostLabels } from "./axis-marks";
import { colourMapOf } from "./colour-key";
import type { LatitudesInput } from "./input";
import type { LatitudesLayout } from "./layout";
import { latitudeScale, rasterRows } from "./map-panel";

/** Widest raster made: at 174 mm this is 600 pixels an inch. */
const mostColumns = 4096;

/** The scale of every panel with a time axis: half a step beyond the first and the last date. */
export function timeScale(input: LatitudesInput): PanelFrame["horizontal"] {
  const [first, last] = cellEdges(input.record.time.values);
  return { kind: "time", from: first, to: last };
}

export function latitudeTimePanel(input: LatitudesInput, layout: LatitudesLayout): PanelFrame {
  return {
    id: "latitude-time",
    ...layout.latitudeTime,
    horizontal: timeScale(input),
    vertical: latitudeScale(input),
  };
}

/**
 * The column shown at each column of the raster, or -1 for blank. Columns that tile the frame evenly are shown one to one;
 * others are looked up by the nearest date, and gaps longer than 1.5 usual steps stay blank.
 */
export function rasterColumns(dates: Float64Array, panel: PanelFrame): Int32Array {
  if (dates.length === 0) return Int32Array.of(-1);
  const { from, to } = panel.horizontal;
  const usual = usualSpacing(dates);
  const tiles = Math.abs(usual * dates.length - (to - from)) < 1e-6 * usual && isEven(dates, usual);
  const count = tiles ? dates.length : Math.min(mostColumns, Math.ceil(4 * panel.width));
  return dates.length === 1 ? new Int32Array(count) : nearestCellsOrGaps(dates, from, to, count);
}

function isEven(dates: Float64Array, usual: number): boolean {
  return dates.every((date, index) => index === 0 || Math.abs(date - dates[index - 1] - usual) < 1e-6 * usual);
}

/** Zonal means by date: NaN and gaps in the missing colour, the map's date as an amber line. */
export function latitudeTimeMarks(
  input: LatitudesInput,
  layout: LatitudesLayout,
  panel: PanelFrame,
  theme: Theme,
): Mark[] {
  const { latitudeTime, columnDates, pictureLimits, dateIndex } = input.result;
  const times = input.record.time.values;
  const rows = rasterRows(input, panel);
  const columns = rasterColumns(
    Float64Array.from(columnDates, (date) => times[date]),
    panel,
  );
  const values = gatherCells(latitudeTime.values, latitudeTime.columns, rows, columns);
  const pixels = paint(values, pictureLimits, colourMapOf(input, theme), { missing: theme.missing });
  const x = pixelX(panel, times[dateIndex]);
  const { from, to } = panel.horizontal;
  const ticks = timeTicks(
    input.record.time.calendar,
    from,
    to,
    (candidate) =>
      candidate.length <= mostLabels && labelsKeepApart(panel, candidate, layout.sizes.small, 0.9 * layout.sizes.small),
  );
  const within = [panel.x - layout.panelGap / 2, panel.x + panel.width + 2 * layout.sizes.heading - 4] as const;
  return [
    rasterMark("latitude-time-raster", panel, columns.length, rows.length, pixels),
    pathMark("latitude-time-date", linePath(x, panel.y, x, panel.y + panel.height), {
      stroke: theme.amber,
      strokeWidth: dataWidth,
      clip: panel.id,
    }),
    frameMark(panel, theme),
    ...bottomTickMarks(panel, ticks, within, theme, layout.sizes),
  ];
}
