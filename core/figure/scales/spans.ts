import { labelsKeepApart, mostLabels } from "../latitudes/axis-marks";
import { pixelY } from "../panel";
import { cellEdges, nearestCellsOrGaps, usualSpacing } from "../resample";
import type { PanelFrame } from "../scene";
import { textWidth } from "../text-width";
import type { Tick } from "../ticks";
import type { Drawing } from "./input";
import type { Cell } from "./layout";

const mostCells = 4096;

/** Outer edges of cells about `centres` (ascending). */
export function outerEdges(centres: ArrayLike<number>): readonly [first: number, last: number] {
  return cellEdges(centres);
}

/**
 * For the cells of a raster from `from` to `to`: the index of the centre (ascending) shown there, -1 in gaps and beyond the
 * ends. Even centres that tile the span are shown one to one; others are looked up at four cells a pixel.
 */
export function shownCells(centres: Float64Array, from: number, to: number, pixels: number): Int32Array {
  if (centres.length === 0) return Int32Array.of(-1);
  if (centres.length === 1) return Int32Array.of(0);
  const usual = usualSpacing(centres);
  const isEven = centres.every((value, i) => i === 0 || Math.abs(value - centres[i - 1] - usual) < 1e-3 * usual);
  const tiles = isEven && Math.abs(usual * centres.length - Math.abs(to - from)) < 1e-3 * usual;
  return nearestCellsOrGaps(centres, from, to, tiles ? centres.length : Math.min(mostCells, Math.ceil(4 * pixels)));
}

/** Whether labels under a panel keep apart and are not too many. */
export function fitsAcross(panel: PanelFrame, { sizes }: Drawing): (ticks: readonly Tick[]) => boolean {
  return (ticks) =>
    ticks.length <= mostLabels && labelsKeepApart(panel, ticks, sizes.small, 0.9 * sizes.small) && ticks.length > 0;
}

/** Whether labels left of a panel keep apart and fit into the cell's inset. */
export function fitsUp(panel: PanelFrame, cell: Cell, { sizes }: Drawing): (ticks: readonly Tick[]) => boolean {
  const { small } = sizes;
  return (ticks) => {
    const places = ticks.map(({ value }) => pixelY(panel, value)).sort((a, b) => a - b);
    return (
      ticks.length > 0 &&
      ticks.every(({ label }) => textWidth(label, small, 400) <= cell.inset - 8) &&
      places.every((y, index) => index === 0 || y - places[index - 1] >= 2 * small)
    );
  };
}

/** How many labels stand calmly one above the other. */
export function labelsUp(cell: Cell, { sizes }: Drawing): number {
  return Math.max(2, Math.min(8, cell.frame.height / (3 * sizes.small)));
}

/** Where tick labels under a cell's frame may reach. */
export function reachAcross(cell: Cell): readonly [left: number, right: number] {
  return [cell.frame.x - cell.inset / 2, cell.frame.x + cell.frame.width + Math.max(4, cell.outset / 2)];
}
