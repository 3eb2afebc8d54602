import type { HeightRecord } from "../record";

/** Half of the window whose mean is taken off along a row, in kilometres. Our choice, no source. */
const halfWindowKm = 100;
/** Dates looked at in each third, and rows of each: enough for a mean square, few enough for an instant. */
const mostDates = 40;
const mostRows = 150;
const kilometresPerDegree = 111.2;

/**
 * Mean square of the heights' short scales (each row less its running mean of about 200 km) in the last third of the record
 * over that in the first: maps from more altimeters hold more of it. NaN where a third has nothing to say. Fixed dates and
 * rows, so that the answer does not depend on anything else.
 */
export function shortScaleChange({ cube, axes, hasData }: HeightRecord): number {
  const third = Math.floor(cube.dates / 3);
  if (third < 2 || cube.columns < 5) return Number.NaN;
  const meanSquare = (from: number, to: number): number => {
    let [squares, count] = [0, 0];
    const dateStride = Math.max(1, Math.ceil((to - from) / mostDates));
    const rowStride = Math.max(1, Math.ceil(cube.rows / mostRows));
    for (let date = from; date < to; date += dateStride) {
      if (!hasData[date]) continue;
      for (let row = 0; row < cube.rows; row += rowStride) {
        const cosine = Math.cos((axes.latitude.values[row] * Math.PI) / 180);
        const cellKm = Math.abs(axes.longitude.step) * kilometresPerDegree * cosine;
        const half = Math.max(1, Math.round(halfWindowKm / cellKm));
        const start = (date * cube.rows + row) * cube.columns;
        const sums = shortScaleSquares(cube.values, start, cube.columns, half);
        squares += sums.squares;
        count += sums.count;
      }
    }
    return squares / count;
  };
  return meanSquare(cube.dates - third, cube.dates) / meanSquare(0, third);
}

/** Squares of a row less its centred running mean, where the whole window is valid. */
function shortScaleSquares(values: ArrayLike<number>, start: number, columns: number, half: number) {
  let [squares, count, sum, valid] = [0, 0, 0, 0];
  const width = 2 * half + 1;
  for (let column = 0; column < columns; column++) {
    const entering = values[start + column];
    if (!Number.isNaN(entering)) {
      sum += entering;
      valid++;
    }
    if (column >= width) {
      const leaving = values[start + column - width];
      if (!Number.isNaN(leaving)) {
        sum -= leaving;
        valid--;
      }
    }
    if (column < width - 1 || valid < width) continue;
    const rest = values[start + column - half] - sum / width;
    squares += rest * rest;
    count++;
  }
  return { squares, count };
}
