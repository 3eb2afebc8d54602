import { type Sections, zeroPhaseResponse } from "../numeric/filters/butterworth";
import { type BridgedPiece, bridgedPieces, knownSamples, unbridgeRow } from "../numeric/filters/pieces";
import { fewestSamples, paddingReach, zeroPhaseFilter, zeroPhaseWeights } from "../numeric/filters/zero-phase";
import { zeroPhaseRow } from "../numeric/filters/zero-phase-row";
import { bridgeGaps } from "../numeric/gaps";
import type { TimeFilter } from "./time-filter";

/**
 * Second-order sections run forward and back over each piece, short gaps bridged by straight lines. A piece must be longer
 * than the padding; values within the padding's reach of a piece's ends are marked.
 */
export function butterworthTimeFilter(sections: Sections, bridge: number): TimeFilter {
  const fewest = fewestSamples(sections);
  const reach = paddingReach(sections);
  const weights = zeroPhaseWeights(sections).map(Math.abs);
  const isLong = ({ from, to }: BridgedPiece) => to - from >= fewest;
  return {
    reach,
    response: (frequency) => zeroPhaseResponse(sections, frequency),
    apply: (series, at) => {
      const { values } = bridgeGaps(series, bridge);
      const out = new Float64Array(series.length).fill(Number.NaN);
      for (const piece of bridgedPieces(knownSamples(series), bridge).filter(isLong)) {
        out.set(zeroPhaseFilter(values.slice(piece.from, piece.to), sections), piece.from);
      }
      return at ? Float64Array.from(at, (t) => out[t]) : out;
    },
    row: (known, date) => {
      const piece = bridgedPieces(known, bridge).find(({ from, to }) => date >= from && date < to);
      if (!piece || !isLong(piece)) return null;
      const own = zeroPhaseRow(piece.to - piece.from, date - piece.from, sections);
      unbridgeRow(own, known, piece);
      const row = new Float64Array(known.length);
      row.set(own, piece.from);
      return row;
    },
    padding: sections.padSamples,
    share: (known) => {
      const out = new Float64Array(known.length);
      for (const piece of bridgedPieces(known, bridge).filter(isLong)) {
        for (let t = piece.from; t < piece.to; t++) out[t] = weightOnData(weights, known, piece, t);
      }
      return out;
    },
    ends: (known) => {
      const flags = new Uint8Array(known.length).fill(1);
      for (const { from, to } of bridgedPieces(known, bridge).filter(isLong)) {
        if (to - reach > from + reach) flags.fill(0, from + reach, to - reach);
      }
      return flags;
    },
  };
}

/** Share of the filter's absolute weight (by lag) at t that lies on a piece's known samples. */
function weightOnData(weights: Float64Array, known: Uint8Array, { from, to }: BridgedPiece, t: number): number {
  let on = known[t] ? weights[0] : 0;
  let total = weights[0];
  for (let lag = 1; lag < weights.length; lag++) {
    total += 2 * weights[lag];
    if (t - lag >= from && known[t - lag]) on += weights[lag];
    if (t + lag < to && known[t + lag]) on += weights[lag];
  }
  return on / total;
}
