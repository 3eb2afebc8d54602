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
