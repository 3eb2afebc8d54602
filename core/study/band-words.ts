import type { BandSettings } from "./schema";

/** The periods a band keeps, in words: "periods of 90 to 540 days", "periods over 90 days", "all periods". */
export function bandWords({ filter, shortestDays, longestDays }: BandSettings): string {
  if (filter === "none" || (shortestDays === null && longestDays === null)) return "all periods";
  if (longestDays === null) return `periods over ${shortestDays} days`;
  if (shortestDays === null) return `periods under ${longestDays} days`;
  return `periods of ${shortestDays} to ${longestDays} days`;
}
