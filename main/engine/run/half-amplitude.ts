import { type BandFilter, bandResponse } from "../../../core/numeric/band-filter";

/**
 * Periods in days at which the filter's response crosses a level, shortest first, between two samples and the record's
 * length. Found by bisection between neighbours of a fine logarithmic sweep.
 */
export function crossingPeriods(filter: BandFilter, level: number, stepDays: number, recordDays: number): number[] {
  const off = (period: number) => bandResponse(filter, stepDays / period) - level;
  const shortest = 2 * stepDays;
  const sweep = Array.from({ length: 801 }, (_, i) => shortest * (recordDays / shortest) ** (i / 800));
  const found: number[] = [];
  for (let i = 1; i < sweep.length; i++) {
    let [low, high] = [sweep[i - 1], sweep[i]];
    if (off(low) * off(high) > 0) continue;
    for (let step = 0; step < 60; step++) {
      const middle = (low + high) / 2;
      if (off(low) * off(middle) <= 0) high = middle;
      else low = middle;
    }
    found.push((low + high) / 2);
  }
  return found;
}
