/** A picture of values over position and time, `values[row * days.length + column]`, NaN where missing. */
export interface MovingPicture {
  readonly values: Float64Array;
  /** One a row, strictly monotonic; uneven is fine. */
  readonly positionMetres: Float64Array;
  /** One a column, ascending. */
  readonly days: Float64Array;
}

/**
 * Lags at which the picture's autocorrelation along each axis first falls to zero, in metres and days: a quarter of the
 * wavelength and period of a wave. Half the axis where it does not fall to zero before. Lags count rows and columns and
 * take their mean spacing. The values' mean must have been removed.
 */
export function naturalScales({ values, positionMetres, days }: MovingPicture): { metres: number; days: number } {
  const rows = positionMetres.length;
  const columns = days.length;
  const rowLag = firstZero(rows, (lag) => lagProduct(values, (rows - lag) * columns, lag * columns, columns, 0));
  const columnLag = firstZero(columns, (lag) => lagProduct(values, values.length - lag, lag, columns, lag));
  return {
    metres: (rowLag * Math.abs(positionMetres[rows - 1] - positionMetres[0])) / (rows - 1),
    days: (columnLag * (days[columns - 1] - days[0])) / (columns - 1),
  };
}

/** Fractional lag, at least half a step, where a product of lag 1, 2, … first falls to zero. */
function firstZero(length: number, product: (lag: number) => number): number {
  const longest = Math.max(1, Math.floor(length / 2));
  let before = Number.NaN;
  for (let lag = 1; lag <= longest; lag++) {
    const here = product(lag);
    if (!(here > 0)) return Number.isNaN(before) ? 0.5 : lag - 1 + before / (before - here);
    before = here;
  }
  return longest;
}

/** Mean product of values `lag` apart; pairs that would wrap from one row to the next (`columnLag` > 0) are left out. */
function lagProduct(values: Float64Array, end: number, lag: number, columns: number, columnLag: number): number {
  let sum = 0;
  let pairs = 0;
  for (let i = 0; i < end; i++) {
    if (columnLag > 0 && (i % columns) + columnLag >= columns) continue;
    const product = values[i] * values[i + lag];
    if (Number.isNaN(product)) continue;
    sum += product;
    pairs++;
  }
  return pairs > 0 ? sum / pairs : 0;
}
