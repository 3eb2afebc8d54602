/** Averaging times in days that are looked at, where the record holds two blocks of them. Our choice, no source. */
const wantedDays = [1, 3, 10, 30, 90, 180, 450, 900, 1800, 3600];

/** Block lengths in dates for averaging, rising, each once; the record must hold at least two blocks. */
export function averagingBlocks(dates: number, stepDays: number): number[] {
  const lengths = wantedDays.map((days) => Math.max(1, Math.round(days / stepDays)));
  return [...new Set(lengths)].filter((length) => 2 * length <= dates);
}
