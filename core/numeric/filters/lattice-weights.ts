export interface LatticeWeights {
  readonly nodes: readonly number[];
  readonly weights: readonly number[];
}

/**
 * Lagrange weights at an index from the four lattice nodes about it (the outermost four near an end, fewer where there are
 * fewer): exact for cubics. `nodes` are rising indices; `turn` is the length of a periodic axis, or null.
 */
export function cubicWeights(nodes: readonly number[], at: number, turn: number | null): LatticeWeights {
  const count = nodes.length;
  const used = Math.min(4, count);
  let after = nodes.findIndex((node) => node > at);
  if (after < 0) after = count;
  const first = turn === null ? Math.max(0, Math.min(after - 2, count - used)) : after - 2;
  const chosen = Array.from({ length: used }, (_, i) => first + i);
  const places = chosen.map((i) => {
    if (turn === null) return nodes[i];
    const lap = Math.floor(i / count);
    return nodes[i - lap * count] + lap * turn;
  });
  const weights = places.map((place, i) =>
    places.reduce((product, other, j) => (i === j ? product : (product * (at - other)) / (place - other)), 1),
  );
  return { nodes: chosen.map((i) => ((i % count) + count) % count), weights };
}
