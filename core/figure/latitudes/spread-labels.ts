/**
 * Places for labels that want to stand at `wanted`: at least `gap` apart, between `low` and `high`, together as near to what
 * they want as can be (least squares). In the order given. Where they do not all fit, the last ones reach beyond `high`:
 * see `mostLabelsBetween`. Isotonic regression by pooling neighbours, Barlow et al. 1972 [from memory].
 */
export function spreadLabels(wanted: readonly number[], gap: number, low: number, high: number): number[] {
  const order = wanted.map((_, index) => index).sort((a, b) => wanted[a] - wanted[b] || a - b);
  // Less one gap a label the places need only rise, which pooling brings about.
  const pools: { sum: number; count: number }[] = [];
  for (const [rank, index] of order.entries()) {
    pools.push({ sum: wanted[index] - rank * gap, count: 1 });
    while (pools.length > 1 && meanOf(pools.at(-2)) > meanOf(pools.at(-1))) {
      const last = pools.pop();
      const before = pools.pop();
      if (last && before) pools.push({ sum: last.sum + before.sum, count: last.count + before.count });
    }
  }
  const highest = Math.max(low, high - (wanted.length - 1) * gap);
  const levels = pools.flatMap((pool) => new Array<number>(pool.count).fill(meanOf(pool)));
  const places = new Array<number>(wanted.length).fill(0);
  for (const [rank, index] of order.entries()) {
    places[index] = Math.min(highest, Math.max(low, levels[rank])) + rank * gap;
  }
  return places;
}

/** How many labels fit between `low` and `high` at `gap` apart. */
export function mostLabelsBetween(gap: number, low: number, high: number): number {
  return high < low ? 0 : Math.floor((high - low) / gap + 1e-9) + 1;
}

function meanOf(pool: { readonly sum: number; readonly count: number } | undefined): number {
  return pool ? pool.sum / pool.count : 0;
}
