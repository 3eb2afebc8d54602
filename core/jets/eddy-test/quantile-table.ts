/** A distribution as its quantiles at even steps of probability from 0 to 1, ascending; straight lines between them. */
export type QuantileTable = readonly number[];

const steps = 20;

/** Quantiles of a sample at probabilities 0, 0.05 … 1. The sample is not changed; it must not be empty. */
export function quantilesOf(sample: ArrayLike<number>): number[] {
  const sorted = Float64Array.from(sample).sort();
  return Array.from({ length: steps + 1 }, (_, i) => quantileAt(sorted, i / steps));
}

/** The value at a probability in [0, 1]. */
export function quantileAt(table: ArrayLike<number>, probability: number): number {
  const place = probability * (table.length - 1);
  const below = Math.min(Math.floor(place), table.length - 2);
  if (below < 0) return table[0];
  return table[below] + (place - below) * (table[below + 1] - table[below]);
}

/** Mean of the square of a draw; exact for the straight lines. */
export function meanSquare(table: QuantileTable): number {
  if (table.length === 1) return table[0] * table[0];
  let sum = 0;
  for (let i = 1; i < table.length; i++) {
    const [a, b] = [table[i - 1], table[i]];
    sum += (a * a + a * b + b * b) / 3;
  }
  return sum / (table.length - 1);
}

/** The same distribution stretched so that its median is `median`. */
export function withMedian(table: QuantileTable, median: number): number[] {
  const factor = median / quantileAt(table, 0.5);
  return table.map((value) => value * factor);
}
