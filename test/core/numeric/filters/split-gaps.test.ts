import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { lanczosBand } from "../../../../core/numeric/band-filter";
import { butterworthSections } from "../../../../core/numeric/filters/butterworth";
import { lanczosPieces, runningMeanPieces, zeroPhasePieces } from "../../../../core/numeric/filters/piece-filters";
import { filterWithGaps, type PieceFilter, piecesOf } from "../../../../core/numeric/filters/split-gaps";
import { paddingReach } from "../../../../core/numeric/filters/zero-phase";
import { expectAllClose } from "../../../expect-close";

const lowPass = butterworthSections({ order: 3, shortestSamples: 12, longestSamples: null, cut: "half-amplitude" });
const filters: [string, PieceFilter][] = [
  ["Lanczos", lanczosPieces(lanczosBand(12, Number.POSITIVE_INFINITY))],
  ["Butterworth", zeroPhasePieces(lowPass)],
  ["running mean", runningMeanPieces(9)],
];
const unchanged: PieceFilter = (piece) => ({ values: piece.slice(), edge: new Uint8Array(piece.length) });

function gappy(length: number, gaps: readonly (readonly [number, number])[]): Float64Array {
  const series = Float64Array.from({ length }, (_, t) => Math.sin(t / 9) + 0.01 * t);
  for (const [from, to] of gaps) series.fill(Number.NaN, from, to);
  return series;
}

describe("filtering with gaps", () => {
  test("short interior gaps are bridged by a straight line and flagged, long ones stay untouched", () => {
    const series = Float64Array.of(Number.NaN, 1, Number.NaN, Number.NaN, 4, 5, Number.NaN, Number.NaN, Number.NaN, 6);
    const { values, bridged, pieces } = filterWithGaps(series, { bridge: 2 }, unchanged);
    expect([...values]).toEqual([Number.NaN, 1, 2, 3, 4, 5, Number.NaN, Number.NaN, Number.NaN, 6]);
    expect([...bridged]).toEqual([0, 0, 1, 1, 0, 0, 0, 0, 0, 0]);
    expect(pieces).toEqual([
      { from: 1, to: 6, blank: null },
      { from: 9, to: 10, blank: null },
    ]);
  });

  test.each(filters)("%s: what lies beyond a long gap has no say", (_, filter) => {
    const series = gappy(300, [[140, 150]]);
    const other = series.slice();
    for (let t = 150; t < 300; t++) other[t] = 5 - other[t];
    const [a, b] = [series, other].map((each) => filterWithGaps(each, { bridge: 3 }, filter));
    expect([...a.values.subarray(0, 150)]).toEqual([...b.values.subarray(0, 150)]);
    expect(a.values.subarray(140, 150).every(Number.isNaN)).toBe(true);
    const alone = filterWithGaps(series.slice(0, 140), { bridge: 3 }, filter);
    expect([...a.values.subarray(0, 140)]).toEqual([...alone.values]);
  });

  test.each(filters)("%s: a piece too short is given back blank with the reason", (_, filter) => {
    const { values, pieces, lostAtStart } = filterWithGaps(gappy(200, [[5, 20]]), { bridge: 3 }, filter);
    expect(pieces[0].blank).toMatch(/^5 samples without a gap where the filter needs \d+$/);
    expect(values.subarray(0, 5).every(Number.isNaN)).toBe(true);
    expect(pieces[1].blank).toBeNull();
    expect(lostAtStart).toBeGreaterThan(20);
  });

  test.each(filters)("%s: a constant stays constant through gaps of both kinds", (_, filter) => {
    const series = new Float64Array(300).fill(2.5).fill(Number.NaN, 60, 62).fill(Number.NaN, 150, 170);
    const { values } = filterWithGaps(series, { bridge: 3 }, filter);
    const known = values.filter((value) => !Number.isNaN(value));
    expectAllClose(
      known,
      known.map(() => 2.5),
      { absolute: 1e-11, because: "recursion over 150 samples" },
    );
  });

  test.each(filters)("%s: lost samples at each end are those before the first trusted value", (_, filter) => {
    const { edge, values, lostAtStart, lostAtEnd } = filterWithGaps(gappy(300, [[0, 4]]), { bridge: 3 }, filter);
    expect(values.subarray(0, 4).every(Number.isNaN)).toBe(true);
    expect(edge[lostAtStart]).toBe(0);
    for (let t = 4; t < lostAtStart; t++) expect(edge[t] === 1 || Number.isNaN(values[t])).toBe(true);
    expect(lostAtStart - 4).toBe(lostAtEnd);
    expect(lostAtEnd).toBeGreaterThan(2);
  });

  test("a forward-and-back filter's edge is its padding's reach on both sides of every piece", () => {
    const { edge } = filterWithGaps(gappy(300, [[140, 150]]), { bridge: 3 }, zeroPhasePieces(lowPass));
    const reach = paddingReach(lowPass);
    const wanted = Uint8Array.from(edge, (_, t) =>
      [0, 150].some((from) => t >= from && t < from + reach) || [140, 300].some((to) => t < to && t >= to - reach)
        ? 1
        : 0,
    );
    expect([...edge]).toEqual([...wanted]);
  });

  test("a series without any value loses everything", () => {
    const lost = filterWithGaps(new Float64Array(30).fill(Number.NaN), { bridge: 3 }, unchanged);
    expect([lost.lostAtStart, lost.lostAtEnd, lost.pieces.length]).toEqual([30, 30, 0]);
  });

  test("pieces cover exactly the known samples", () => {
    fc.assert(
      fc.property(fc.array(fc.boolean(), { maxLength: 60 }), (known) => {
        const pieces = piecesOf(Float64Array.from(known, (each) => (each ? 1 : Number.NaN)));
        const covered = new Array(known.length).fill(false);
        for (const { from, to } of pieces) covered.fill(true, from, to);
        expect(covered).toEqual(known);
        pieces.slice(1).forEach((piece, i) => {
          expect(piece.from).toBeGreaterThan(pieces[i].to);
        });
      }),
    );
  });
});
