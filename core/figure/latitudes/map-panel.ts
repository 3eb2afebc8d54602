import { paint } from "../colour/paint";
import type { Theme } from "../colour/theme";
import { pathMark, rasterMark } from "../marks";
import { cellEdges, gatherCells, nearestCells } from "../resample";
import type { Mark, PanelFrame } from "../scene";
import { longitudeTicks, type Tick } from "../ticks";
import { bottomTickMarks, frameMark, hairWidth, leftTickMarks, roomiestTicks } from "./axis-marks";
import { blendMarks } from "./blend-bracket";
import { colourMapOf } from "./colour-key";
import { doubtfulCells } from "./doubtful-cells";
import { hatchPath } from "./hatch";
import type { LatitudesInput } from "./input";
import type { LatitudesLayout } from "./layout";

/** Width of a lone row or column, where the spacing is not known. */
const loneCellDegrees = 1;

/** Scale of every panel in the row: the outer edges of the latitude cells, north at the top. */
export function latitudeScale(input: LatitudesInput): PanelFrame["vertical"] {
  const [south, north] = cellEdges(input.record.latitude.values, loneCellDegrees);
  return { kind: "latitude", from: north, to: south };
}

export function mapPanel(input: LatitudesInput, layout: LatitudesLayout): PanelFrame {
  const [west, east] = cellEdges(input.record.longitude.values, loneCellDegrees);
  return {
    id: "map",
    ...layout.map,
    horizontal: { kind: "longitude", from: west, to: east },
    vertical: latitudeScale(input),
  };
}

/**
 * Rows of a raster that shows a plane of ascending latitudes with north at the top: one a cell where cells are even, else
 * one a quarter of a pixel. The entries are row indices of the plane.
 */
export function rasterRows(input: LatitudesInput, panel: PanelFrame): Int32Array {
  return rasterCells(input.record.latitude, panel.vertical, panel.height);
}

function rasterCells(
  axis: { readonly values: Float64Array; readonly even: boolean },
  scale: { readonly from: number; readonly to: number },
  pixels: number,
): Int32Array {
  const count = axis.even ? axis.values.length : Math.min(8192, Math.ceil(4 * pixels));
  return nearestCells(axis.values, scale.from, scale.to, count);
}

/** Distance of hatch lines along a row, in small type sizes: close enough for a lone cell, far enough to see the colour. */
const hatchSpacing = 0.6;

/** The map on the date: sharp cells, land and missing values in their own greys, values within their error hatched. */
export function mapMarks(
  input: LatitudesInput,
  layout: LatitudesLayout,
  panel: PanelFrame,
  latitudeTicks: readonly Tick[],
  theme: Theme,
): Mark[] {
  const { map, limits } = input.result;
  const rows = rasterRows(input, panel);
  const columns = rasterCells(input.record.longitude, panel.horizontal, panel.width);
  const values = gatherCells(map.values, map.columns, rows, columns);
  const ocean = Uint8Array.from(gatherCells(input.record.ocean, map.columns, rows, columns));
  const pixels = paint(values, limits, colourMapOf(input, theme), { missing: theme.missing, land: theme.land, ocean });
  const { from: west, to: east } = panel.horizontal;
  const ticks = roomiestTicks(
    panel,
    (most) => longitudeTicks(west, east, most),
    layout.sizes,
    1.5 * layout.sizes.small,
  );
  const within = [0, panel.x + panel.width + layout.panelGap / 2] as const;
  const { error } = input.result;
  const marked = error
    ? Uint8Array.from(gatherCells(doubtfulCells(map, error.map), map.columns, rows, columns))
    : new Uint8Array(0);
  const hatch = hatchPath(marked, columns.length, panel, hatchSpacing * layout.sizes.small);
  return [
    rasterMark("map-raster", panel, columns.length, rows.length, pixels),
    ...(hatch === ""
      ? []
      : [pathMark("map-doubt", hatch, { stroke: theme.hatch, strokeWidth: hairWidth, clip: panel.id })]),
    frameMark(panel, theme),
    ...leftTickMarks(panel, latitudeTicks, theme, layout.sizes),
    ...blendMarks(input.record, panel, theme),
    ...bottomTickMarks(panel, ticks, within, theme, layout.sizes),
  ];
}
