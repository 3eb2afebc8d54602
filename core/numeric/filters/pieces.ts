/** Samples from … to - 1, known at both ends, with no gap inside longer than what may be bridged. */
export interface BridgedPiece {
  readonly from: number;
  readonly to: number;
}

/** Splits a record at the gaps longer than `bridge` samples. `known[i]` is 1 where sample i is there. */
export function bridgedPieces(known: Uint8Array, bridge: number): BridgedPiece[] {
  const pieces: { from: number; to: number }[] = [];
  for (let i = 0; i < known.length; i++) {
    if (!known[i]) continue;
    const last = pieces.at(-1);
    if (last && i - last.to <= bridge) last.to = i + 1;
    else pieces.push({ from: i, to: i + 1 });
  }
  return pieces;
}

/** 1 on missing samples inside a piece. */
export function bridgedSamples(known: Uint8Array, bridge: number): Uint8Array {
  const flags = new Uint8Array(known.length);
  for (const { from, to } of bridgedPieces(known, bridge)) {
    for (let i = from; i < to; i++) if (!known[i]) flags[i] = 1;
  }
  return flags;
}

/** 1 where the series is not NaN. */
export function knownSamples(series: Float64Array): Uint8Array {
  return Uint8Array.from(series, (value) => (Number.isNaN(value) ? 0 : 1));
}

/**
 * What the weights of a filter on a piece bridged by straight lines ask of the known samples alone: each filled sample's
 * weight goes to the two ends of its gap, by distance. Changes `row`, whose index 0 is the piece's first sample.
 */
export function unbridgeRow(row: Float64Array, known: Uint8Array, { from, to }: BridgedPiece): void {
  let last = from;
  for (let i = from + 1; i < to; i++) {
    if (!known[i]) continue;
    const span = i - last;
    for (let k = 1; k < span; k++) {
      const weight = row[last - from + k];
      row[last - from] += weight * (1 - k / span);
      row[i - from] += weight * (k / span);
      row[last - from + k] = 0;
    }
    last = i;
  }
}
