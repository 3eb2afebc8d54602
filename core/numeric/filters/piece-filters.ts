import { type BandFilter, filterSeries, trustedWeightShare, weightShare } from "../band-filter";
import type { Sections } from "./butterworth";
import { runningMean } from "./running-mean";
import type { PieceFilter } from "./split-gaps";
import { fewestSamples, paddingReach, zeroPhaseFilter } from "./zero-phase";

/** Lanczos weights on a piece: at least as long as the half-width; edge values rest on under 90 % of a low-pass's weight. */
export function lanczosPieces(filter: BandFilter): PieceFilter {
  return (piece) => {
    if (piece.length < filter.halfWidth) return shortage(piece.length, filter.halfWidth);
    const share = weightShare(filter, new Uint8Array(piece.length).fill(1));
    return { values: filterSeries(piece, filter), edge: edgeOf(share) };
  };
}

/** Sections forward and back on a piece: longer than the padding; edge values lie within the padding's reach. */
export function zeroPhasePieces(sections: Sections): PieceFilter {
  const fewest = fewestSamples(sections);
  const reach = paddingReach(sections);
  return (piece) => {
    const count = piece.length;
    if (count < fewest) return shortage(count, fewest);
    const edge = Uint8Array.from(piece, (_, t) => (t < reach || t >= count - reach ? 1 : 0));
    return { values: zeroPhaseFilter(piece, sections), edge };
  };
}

/** Running mean on a piece: at least one whole window; edge values rest on under 90 % of it. */
export function runningMeanPieces(points: number): PieceFilter {
  return (piece) => {
    if (piece.length < points) return shortage(piece.length, points);
    const { values, share } = runningMean(piece, points);
    return { values, edge: edgeOf(share) };
  };
}

function shortage(got: number, needed: number): { tooShort: string } {
  return { tooShort: `${got} samples without a gap where the filter needs ${needed}` };
}

function edgeOf(share: Float64Array): Uint8Array {
  return Uint8Array.from(share, (each) => (each < trustedWeightShare ? 1 : 0));
}
