import { leastWeightShare, trustedWeightShare } from "../numeric/band-filter";
import { type BridgedPiece, bridgedPieces, knownSamples } from "../numeric/filters/pieces";
import { runningMean, runningMeanResponse, runningMeanWeights } from "../numeric/filters/running-mean";
import type { TimeFilter } from "./time-filter";

/**
 * A running mean over each piece, less a longer one for a band: a missing date takes the one opposite with it, so that a
 * straight line is kept. `shortest` and `longest` are window lengths in samples; null leaves that side open.
 */
export function runningMeanTimeFilter(shortest: number | null, longest: number | null, bridge: number): TimeFilter {
  const windows = [shortest, longest].filter((points) => points !== null);
  const needed = Math.max(...windows);
  const reach = Math.floor(needed / 2);
  const isLong = ({ from, to }: BridgedPiece) => to - from >= needed;
  const smoothed = (series: Float64Array, points: number | null) =>
    points === null ? null : runningMean(series, points);
  const share = (known: Uint8Array) => {
    const out = new Float64Array(known.length);
    for (const piece of bridgedPieces(known, bridge).filter(isLong)) {
      const own = Float64Array.from(known.subarray(piece.from, piece.to), (flag) => (flag ? 0 : Number.NaN));
      const shares = windows.map((points) => runningMean(own, points).share);
      for (let i = 0; i < own.length; i++) out[piece.from + i] = Math.min(...shares.map((each) => each[i]));
    }
    return out;
  };
  return {
    reach,
    response: (frequency) =>
      (shortest === null ? 1 : runningMeanResponse(shortest, frequency)) -
      (longest === null ? 0 : runningMeanResponse(longest, frequency)),
    apply: (series, at) => {
      const out = new Float64Array(series.length).fill(Number.NaN);
      for (const piece of bridgedPieces(knownSamples(series), bridge).filter(isLong)) {
        const own = series.slice(piece.from, piece.to);
        const fast = smoothed(own, shortest)?.values ?? own;
        const slow = smoothed(own, longest)?.values;
        out.set(slow ? fast.map((value, i) => value - slow[i]) : fast, piece.from);
      }
      return at ? Float64Array.from(at, (t) => out[t]) : out;
    },
    row: (known, date) => {
      const piece = bridgedPieces(known, bridge).find(({ from, to }) => date >= from && date < to);
      if (!piece || !isLong(piece)) return null;
      const row = new Float64Array(known.length);
      if (shortest !== null) {
        if (!addMean(row, 1, shortest, known, piece, date)) return null;
      } else if (known[date]) row[date] = 1;
      else return null;
      if (longest !== null && !addMean(row, -1, longest, known, piece, date)) return null;
      return row;
    },
    padding: 0,
    share,
    ends: (known) => Uint8Array.from(share(known), (own) => (own >= trustedWeightShare ? 0 : 1)),
  };
}

/** Adds the mean's weights scaled to sum `sign`, in pairs about the date; false where too little weight meets data. */
function addMean(
  row: Float64Array,
  sign: 1 | -1,
  points: number,
  known: Uint8Array,
  piece: BridgedPiece,
  date: number,
): boolean {
  const weights = runningMeanWeights(points);
  const halfWidth = (weights.length - 1) / 2;
  const reach = Math.min(halfWidth, date - piece.from, piece.to - 1 - date);
  const used: [date: number, weight: number][] = known[date] ? [[date, weights[halfWidth]]] : [];
  for (let k = 1; k <= reach; k++) {
    if (!known[date - k] || !known[date + k]) continue;
    used.push([date - k, weights[halfWidth + k]], [date + k, weights[halfWidth + k]]);
  }
  const share = used.reduce((sum, [, weight]) => sum + weight, 0);
  if (share < leastWeightShare) return false;
  for (const [at, weight] of used) row[at] += (sign * weight) / share;
  return true;
}
