/** Spacings this much longer than the usual one are gaps: nothing is drawn in them. */
const gapSteps = 1.5;

/**
 * Outer edges of the cells that are centred on `centres` (monotonic): half a cell beyond the end centres. One centre gets a
 * cell of `loneWidth`.
 */
export function cellEdges(centres: ArrayLike<number>, loneWidth = 1): readonly [first: number, last: number] {
  const count = centres.length;
  if (count === 1) return [centres[0] - loneWidth / 2, centres[0] + loneWidth / 2];
  return [
    centres[0] - (centres[1] - centres[0]) / 2,
    centres[count - 1] + (centres[count - 1] - centres[count - 2]) / 2,
  ];
}

/** Index of the cell centre nearest to `position` in `centres` (ascending); ends for positions outside. */
export function nearestCell(centres: ArrayLike<number>, position: number): number {
  let low = 0;
  let high = centres.length - 1;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if (centres[middle] <= position) low = middle;
    else high = middle;
  }
  return position - centres[low] <= centres[high] - position ? low : high;
}

/** Median of the spacings of `centres`; NaN for fewer than two. */
export function usualSpacing(centres: ArrayLike<number>): number {
  const spacings: number[] = [];
  for (let i = 1; i < centres.length; i++) spacings.push(Math.abs(centres[i] - centres[i - 1]));
  spacings.sort((a, b) => a - b);
  return spacings.length > 0 ? spacings[spacings.length >> 1] : Number.NaN;
}

/** For `count` equal pixels from `from` to `to`: the index of the cell (centres ascending) nearest to each pixel's centre. */
export function nearestCells(centres: ArrayLike<number>, from: number, to: number, count: number): Int32Array {
  return Int32Array.from({ length: count }, (_, pixel) => nearestCell(centres, pixelCentre(pixel, from, to, count)));
}

/**
 * The same with gaps: -1 for pixels in a gap. A cell reaches half way to its neighbour; where the neighbour is farther than
 * 1.5 usual spacings, or there is none, it reaches half a usual spacing only.
 */
export function nearestCellsOrGaps(centres: ArrayLike<number>, from: number, to: number, count: number): Int32Array {
  const usual = usualSpacing(centres);
  const slack = 1e-9 * Math.abs(to - from);
  return nearestCells(centres, from, to, count).map((cell, pixel) => {
    const position = pixelCentre(pixel, from, to, count);
    const distance = Math.abs(position - centres[cell]);
    const neighbour = position < centres[cell] ? cell - 1 : cell + 1;
    const isEnd = neighbour < 0 || neighbour >= centres.length;
    const isGap = isEnd || Math.abs(centres[neighbour] - centres[cell]) > gapSteps * usual;
    return isGap && distance > usual / 2 + slack ? -1 : cell;
  });
}

function pixelCentre(pixel: number, from: number, to: number, count: number): number {
  return from + ((to - from) * (pixel + 0.5)) / count;
}

/** Values of the cells named by `rowCells` and `columnCells`; -1 gives NaN. `columns` is the width of `values`. */
export function gatherCells(
  values: ArrayLike<number>,
  columns: number,
  rowCells: ArrayLike<number>,
  columnCells: ArrayLike<number>,
): Float32Array {
  const gathered = new Float32Array(rowCells.length * columnCells.length);
  let target = 0;
  for (let row = 0; row < rowCells.length; row++) {
    const start = rowCells[row] * columns;
    for (let column = 0; column < columnCells.length; column++) {
      const isBlank = rowCells[row] < 0 || columnCells[column] < 0;
      gathered[target++] = isBlank ? Number.NaN : values[start + columnCells[column]];
    }
  }
  return gathered;
}
