import type { Box } from "./layout";

/**
 * Diagonal lines, `spacing` pixels apart across the lines' x, clipped to the marked cells of a raster: `marked[row * columns + column]`,
 * rows from the top, cells of equal size in `box`. A line that goes on from cell to cell is one segment, so that path data
 * stay short. Diagonal, since level lines would look like jets. Tenths of a pixel.
 */
export function hatchPath(marked: Uint8Array, columns: number, box: Box, spacing: number): string {
  const rows = columns > 0 ? marked.length / columns : 0;
  if (rows === 0 || !marked.includes(1)) return "";
  const cell = { width: box.width / columns, height: box.height / rows };
  let d = "";
  for (let foot = spacing / 2; foot < box.width + box.height; foot += spacing) {
    d += linePieces(marked, columns, rows, cell, foot)
      .map(([from, to]) => segment(box, foot, from, to))
      .join("");
  }
  return d;
}

/** The line x + y = foot (from the box's corner) from depth `from` to depth `to`. */
function segment(box: Box, foot: number, from: number, to: number): string {
  const [x, y] = [box.x + foot - from, box.y + from];
  const length = tenths(to - from);
  return length > 0 ? `M${tenths(x)} ${tenths(y)}l${-length} ${length}` : "";
}

function tenths(value: number): number {
  return Math.round(value * 10) / 10;
}

/** Depths between which the line x + y = foot runs through marked cells. */
function linePieces(
  marked: Uint8Array,
  columns: number,
  rows: number,
  cell: { readonly width: number; readonly height: number },
  foot: number,
): [from: number, to: number][] {
  const pieces: [number, number][] = [];
  const deepest = Math.min(foot, rows * cell.height);
  let depth = Math.max(0, foot - columns * cell.width);
  let row = Math.min(rows - 1, Math.floor(depth / cell.height + 1e-9));
  let column = Math.min(columns - 1, Math.ceil((foot - depth) / cell.width - 1e-9) - 1);
  while (depth < deepest - 1e-9 && row < rows && column >= 0) {
    const rowEnd = (row + 1) * cell.height;
    const columnEnd = foot - column * cell.width;
    const next = Math.min(rowEnd, columnEnd, deepest);
    if (marked[row * columns + column] === 1) {
      const last = pieces.at(-1);
      if (last && last[1] === depth) last[1] = next;
      else pieces.push([depth, next]);
    }
    if (rowEnd <= next) row++;
    if (columnEnd <= next) column--;
    depth = next;
  }
  return pieces;
}
