import {
  type BandFilter,
  bandResponse,
  filterSeries,
  leastWeightShare,
  trustedWeightShare,
  weightShare,
} from "../numeric/band-filter";
import { bridgedPieces, knownSamples } from "../numeric/filters/pieces";
import type { TimeFilter } from "./time-filter";

/**
 * Lanczos weights with gaps: a missing date inside a piece gets no weight and the weights left are scaled to the same sum,
 * which is how a short gap is bridged; the same at the ends of a piece. A piece must be as long as the half-width.
 */
export function lanczosTimeFilter(filter: BandFilter, bridge: number): TimeFilter {
  const isLong = ({ from, to }: { from: number; to: number }) => to - from >= filter.halfWidth;
  const share = (known: Uint8Array) => {
    const out = new Float64Array(known.length);
    for (const piece of bridgedPieces(known, bridge).filter(isLong)) {
      out.set(weightShare(filter, known.subarray(piece.from, piece.to)), piece.from);
    }
    return out;
  };
  return {
    reach: filter.halfWidth,
    response: (frequency) => bandResponse(filter, frequency),
    apply: (series, at) => {
      const wanted = at ?? Int32Array.from(series, (_, t) => t);
      const out = new Float64Array(wanted.length).fill(Number.NaN);
      for (const piece of bridgedPieces(knownSamples(series), bridge).filter(isLong)) {
        const own: number[] = [];
        wanted.forEach((t, i) => {
          if (t >= piece.from && t < piece.to) own.push(i);
        });
        const inPiece = Int32Array.from(own, (i) => wanted[i] - piece.from);
        const values = filterSeries(series.subarray(piece.from, piece.to), filter, inPiece);
        own.forEach((i, k) => {
          out[i] = values[k];
        });
      }
      return out;
    },
    row: (known, date) => {
      const piece = bridgedPieces(known, bridge).find(({ from, to }) => date >= from && date < to);
      if (!piece || !isLong(piece)) return null;
      const row = new Float64Array(known.length);
      if (filter.fast) {
        if (!addLowPass(row, 1, filter.fast, filter.halfWidth, known, piece, date)) return null;
      } else if (known[date]) row[date] = 1;
      else return null;
      if (filter.slow && !addLowPass(row, -1, filter.slow, filter.halfWidth, known, piece, date)) return null;
      return row;
    },
    padding: 0,
    share,
    ends: (known) => Uint8Array.from(share(known), (own) => (own >= trustedWeightShare ? 0 : 1)),
  };
}

/** Adds a low-pass's weights on a piece's known dates, scaled to sum `sign`; false where too little weight meets data. */
function addLowPass(
  row: Float64Array,
  sign: 1 | -1,
  weights: Float64Array,
  halfWidth: number,
  known: Uint8Array,
  piece: { readonly from: number; readonly to: number },
  date: number,
): boolean {
  const from = Math.max(piece.from, date - halfWidth);
  const to = Math.min(piece.to - 1, date + halfWidth);
  let share = 0;
  for (let s = from; s <= to; s++) if (known[s]) share += weights[s - date + halfWidth];
  if (share < leastWeightShare) return false;
  for (let s = from; s <= to; s++) if (known[s]) row[s] += (sign * weights[s - date + halfWidth]) / share;
  return true;
}
