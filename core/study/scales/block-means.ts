/** Means over blocks of dates of series laid out `values[row * dates + date]`. */
export interface BlockMeans {
  /** `values[row * days.length + block]`, NaN where a block has no valid date. */
  readonly values: Float64Array;
  /** Middle of each block. */
  readonly days: Float64Array;
  readonly datesInBlock: number;
}

/**
 * At most `most` blocks of equal length, the incomplete last one left out; every date by itself where they fit. Means damp
 * what single dates picked from the record would alias.
 */
export function blockMeans(values: Float64Array, rows: number, days: Float64Array, most: number): BlockMeans {
  const dates = days.length;
  const datesInBlock = Math.max(1, Math.ceil(dates / most));
  const blocks = Math.floor(dates / datesInBlock);
  const out = new Float64Array(rows * blocks);
  for (let row = 0; row < rows; row++) {
    for (let block = 0; block < blocks; block++) {
      let [sum, count] = [0, 0];
      const from = row * dates + block * datesInBlock;
      for (let i = from; i < from + datesInBlock; i++) {
        if (Number.isNaN(values[i])) continue;
        sum += values[i];
        count++;
      }
      out[row * blocks + block] = sum / count;
    }
  }
  return {
    values: out,
    days: Float64Array.from(
      { length: blocks },
      (_, i) => (days[i * datesInBlock] + days[(i + 1) * datesInBlock - 1]) / 2,
    ),
    datesInBlock,
  };
}
