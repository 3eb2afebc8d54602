import { formatSignificant } from "../format";

/** A band in words, "periods 90–540 days"; empty where nothing is filtered. */
export function bandText(band: {
  readonly filter: string;
  readonly shortestDays: number | null;
  readonly longestDays: number | null;
}): string {
  const { filter, shortestDays, longestDays } = band;
  if (filter === "none" || (shortestDays === null && longestDays === null)) return "";
  if (longestDays === null) return `periods over ${formatSignificant(shortestDays ?? 0, 4)} days`;
  if (shortestDays === null) return `periods under ${formatSignificant(longestDays, 4)} days`;
  return `periods ${formatSignificant(shortestDays, 4)}–${formatSignificant(longestDays, 4)} days`;
}
