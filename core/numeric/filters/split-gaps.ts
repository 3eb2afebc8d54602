import { bridgeGaps } from "../gaps";

/** What a filter makes of one gap-free piece; a reason in words where the piece is too short for it. */
export type PieceOutcome = { readonly values: Float64Array; readonly edge: Uint8Array } | { readonly tooShort: string };

export type PieceFilter = (piece: Float64Array) => PieceOutcome;

/** Samples from … to - 1 without a gap; `blank` says why a piece was given back without values. */
export interface Piece {
  readonly from: number;
  readonly to: number;
  readonly blank: string | null;
}

export interface GappyResult {
  /** NaN in gaps too long to bridge and in pieces too short for the filter. */
  readonly values: Float64Array;
  /** 1 where a missing sample was bridged by a straight line: its value here rests on no datum of its own. */
  readonly bridged: Uint8Array;
  /** 1 where a value is given but rests on too little of the filter's weight, or on padding. */
  readonly edge: Uint8Array;
  /** Samples before the first, and after the last, with a value that is no edge value; all of them where there is none. */
  readonly lostAtStart: number;
  readonly lostAtEnd: number;
  readonly pieces: readonly Piece[];
}

/** Runs of samples that are not NaN, as [from, to) pairs in order. */
export function piecesOf(series: Float64Array): { readonly from: number; readonly to: number }[] {
  const pieces: { from: number; to: number }[] = [];
  let from = -1;
  for (let t = 0; t <= series.length; t++) {
    const known = t < series.length && !Number.isNaN(series[t]);
    if (known && from < 0) from = t;
    if (!known && from >= 0) {
      pieces.push({ from, to: t });
      from = -1;
    }
  }
  return pieces;
}

/**
 * Bridges interior gaps of at most `bridge` samples, splits the series at longer ones and filters each piece by itself: the
 * filter never reaches across an unbridged gap, so a missing sample takes nothing from beyond it.
 */
export function filterWithGaps(
  series: Float64Array,
  { bridge }: { readonly bridge: number },
  filterPiece: PieceFilter,
): GappyResult {
  const { values: whole, filled: bridged } = bridgeGaps(series, bridge);
  const values = new Float64Array(series.length).fill(Number.NaN);
  const edge = new Uint8Array(series.length);
  const pieces = piecesOf(whole).map(({ from, to }): Piece => {
    const outcome = filterPiece(whole.slice(from, to));
    if ("tooShort" in outcome) return { from, to, blank: outcome.tooShort };
    values.set(outcome.values, from);
    edge.set(outcome.edge, from);
    return { from, to, blank: null };
  });
  const trusted = (t: number) => !Number.isNaN(values[t]) && edge[t] === 0;
  let lostAtStart = 0;
  while (lostAtStart < series.length && !trusted(lostAtStart)) lostAtStart++;
  let lostAtEnd = 0;
  while (lostAtEnd < series.length && !trusted(series.length - 1 - lostAtEnd)) lostAtEnd++;
  return { values, bridged, edge, lostAtStart, lostAtEnd, pieces };
}
