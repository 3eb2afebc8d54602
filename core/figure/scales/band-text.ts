import { counted, formatSignificant } from "../format";

/** A band in words, "periods 90–540 days"; empty where nothing is filtered. */
export function bandText(band: {
  readonly filter: string;
  readonly shortestDays: number | null;
  readonly longestDays: number | null;
}): string {
  const { filter, shortestDays, longestDays } = band;
  if (filter === "none" || (shortestDays === null && longestDays === null)) return "";
  if (longestDays === null) return `periods over ${counted(formatSignificant(shortestDays ?? 0, 4), "day")}`;
  if (shortestDays === null) return `periods under ${counted(formatSignificant(longestDays, 4), "day")}`;
  return `periods ${formatSignificant(shortestDays, 4)}–${formatSignificant(longestDays, 4)} days`;
}
