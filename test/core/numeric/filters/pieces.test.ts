import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { bridgedPieces, bridgedSamples, unbridgeRow } from "../../../../core/numeric/filters/pieces";
import { bridgeGaps } from "../../../../core/numeric/gaps";
import { expectClose } from "../../../expect-close";

const flags = fc.array(fc.boolean(), { minLength: 1, maxLength: 80 });
const asKnown = (values: readonly boolean[]) => Uint8Array.from(values, (value) => (value ? 1 : 0));

describe("a record cut at its long gaps", () => {
  test("gaps of the set length are bridged, longer ones split", () => {
    const known = Uint8Array.of(0, 1, 0, 0, 1, 1, 0, 0, 0, 1, 0);
    expect(bridgedPieces(known, 2)).toEqual([
      { from: 1, to: 6 },
      { from: 9, to: 10 },
    ]);
    expect([...bridgedSamples(known, 2)]).toEqual([0, 0, 1, 1, 0, 0, 0, 0, 0, 0, 0]);
    expect(bridgedPieces(new Uint8Array(5), 3)).toEqual([]);
  });

  test("pieces begin and end on known samples, hold all of them, and lie farther apart than the bridge", () => {
    fc.assert(
      fc.property(flags, fc.integer({ min: 0, max: 6 }), (values, bridge) => {
        const known = asKnown(values);
        const pieces = bridgedPieces(known, bridge);
        const inside = known.map((_, i) => (pieces.some(({ from, to }) => i >= from && i < to) ? 1 : 0));
        known.forEach((flag, i) => {
          if (flag) expect(inside[i]).toBe(1);
        });
        pieces.forEach(({ from, to }, k) => {
          expect(known[from] + known[to - 1]).toBe(2);
          if (k > 0) expect(from - pieces[k - 1].to).toBeGreaterThan(bridge);
        });
      }),
    );
  });

  test("weights on a bridged piece, handed to the known samples, give the same sum", () => {
    fc.assert(
      fc.property(
        flags,
        fc.array(fc.double({ min: -2, max: 2, noNaN: true }), { minLength: 80, maxLength: 80 }),
        (values, weights) => {
          const known = asKnown(values);
          const series = Float64Array.from(known, (flag, i) => (flag ? Math.sin(i) + i / 9 : Number.NaN));
          const bridged = bridgeGaps(series, known.length).values;
          for (const piece of bridgedPieces(known, known.length)) {
            const row = Float64Array.from(weights.slice(0, piece.to - piece.from));
            const before = row.reduce((sum, weight, i) => sum + weight * bridged[piece.from + i], 0);
            unbridgeRow(row, known, piece);
            const after = row.reduce((sum, weight, i) => sum + (weight === 0 ? 0 : weight * series[piece.from + i]), 0);
            expectClose(after, before, { absolute: 1e-9, because: "the same products in another order" });
          }
        },
      ),
    );
  });
});
