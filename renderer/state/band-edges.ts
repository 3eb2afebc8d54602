/** The pass band's two periods in days, `shortestDays` < `longestDays`. */
export interface BandEdges {
  readonly shortestDays: number;
  readonly longestDays: number;
}

export type BandEdge = "shortestDays" | "longestDays";

/** Periods an edge may take, in days: twice the sampling (Nyquist) up to the length of the record. */
export interface BandLimits {
  readonly leastDays: number;
  readonly mostDays: number;
}

/**
 * Limits for a record sampled every `stepDays` over `recordDays`, in whole days: no period shorter than twice the step,
 * none longer than the record.
 */
export function bandLimits(stepDays: number, recordDays: number): BandLimits {
  const leastDays = Math.max(1, Math.ceil(2 * stepDays - 1e-6));
  return { leastDays, mostDays: Math.max(leastDays + 1, Math.floor(recordDays + 1e-6)) };
}

/** The edges of a band as handles show them: an open side stands at its limit. */
export function shownEdges(
  band: { readonly shortestDays: number | null; readonly longestDays: number | null },
  limits: BandLimits,
): BandEdges {
  return { shortestDays: band.shortestDays ?? limits.leastDays, longestDays: band.longestDays ?? limits.mostDays };
}

/** What an edge is set to where nothing better is known, in days: the study's own defaults. */
const usualDays: BandEdges = { shortestDays: 90, longestDays: 540 };

/** The band with one open side closed: at its usual period, or as near to that as limits and the other edge allow. */
export function closeSide<Band extends { readonly shortestDays: number | null; readonly longestDays: number | null }>(
  band: Band,
  edge: BandEdge,
  limits: BandLimits,
): Band {
  return moveEdge(band, edge, usualDays[edge], limits);
}

/** The band with both edges brought inside the limits; an open side stays open. */
export function fitBand<Band extends { readonly shortestDays: number | null; readonly longestDays: number | null }>(
  band: Band,
  { leastDays, mostDays }: BandLimits,
): Band {
  const longestDays = band.longestDays && Math.min(mostDays, Math.max(leastDays + 1, band.longestDays));
  const highest = longestDays === null ? mostDays : longestDays - 1;
  const shortestDays = band.shortestDays && Math.max(leastDays, Math.min(highest, band.shortestDays));
  return shortestDays === band.shortestDays && longestDays === band.longestDays
    ? band
    : { ...band, shortestDays, longestDays };
}

/** Limits for a record's time axis; those of two days for a record of one date. */
export function recordLimits(time: { readonly step: number; readonly values: ArrayLike<number> }): BandLimits {
  const step = Math.abs(time.step) || 1;
  return bandLimits(step, step * time.values.length);
}

/** Range that one edge may move in while the other stays: whole days, the edges at least a day apart. */
export function edgeRange(edges: BandEdges, edge: BandEdge, limits: BandLimits): readonly [number, number] {
  if (edge === "shortestDays") return [limits.leastDays, Math.max(limits.leastDays, Math.ceil(edges.longestDays) - 1)];
  return [Math.min(limits.mostDays, Math.floor(edges.shortestDays) + 1), limits.mostDays];
}

/** The band with one edge moved to `days`, snapped to whole days and held within its range. */
export function moveEdge<Band extends { readonly shortestDays: number | null; readonly longestDays: number | null }>(
  band: Band,
  edge: BandEdge,
  days: number,
  limits: BandLimits,
): Band {
  const [least, most] = edgeRange(shownEdges(band, limits), edge, limits);
  const snapped = Math.min(most, Math.max(least, Math.round(days)));
  return snapped === band[edge] || Number.isNaN(snapped) ? band : { ...band, [edge]: snapped };
}

/**
 * The next period up (`direction` 1) or down (-1) on a ladder whose rungs widen with the period, so that one key press
 * is a visible step anywhere on a logarithmic axis: 1 day up to 100, 5 up to 360, 10 beyond.
 */
export function stepPeriod(days: number, direction: 1 | -1): number {
  const above = direction === 1 ? days : days - 1e-9;
  const rung = above < 100 ? 1 : above < 360 ? 5 : 10;
  return direction === 1 ? (Math.floor(days / rung + 1e-9) + 1) * rung : (Math.ceil(days / rung - 1e-9) - 1) * rung;
}
