import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { valueAtX } from "../../core/figure/panel";
import type { PanelFrame } from "../../core/figure/scene";
import {
  bandLimits,
  closeSide,
  edgeRange,
  fitBand,
  moveEdge,
  recordLimits,
  stepPeriod,
} from "../../renderer/state/band-edges";

const band = { shortestDays: 90, longestDays: 540, filter: "lanczos" as const };
const limits = bandLimits(3, 900);

describe("the edges of the pass band", () => {
  test("no edge goes below twice the sampling or beyond the record", () => {
    expect(limits).toEqual({ leastDays: 6, mostDays: 900 });
    expect(moveEdge(band, "shortestDays", 0.1, limits).shortestDays).toBe(6);
    expect(moveEdge(band, "longestDays", 1e9, limits).longestDays).toBe(900);
  });

  test("a sampling that is no whole number of days is rounded up, never below Nyquist", () => {
    expect(bandLimits(0.25, 100).leastDays).toBe(1);
    expect(bandLimits(7.02, 700).leastDays).toBe(15);
  });

  test("edges keep their order, stay whole and stay within limits wherever they are dragged", () => {
    fc.assert(
      fc.property(
        fc.array(fc.tuple(fc.boolean(), fc.double({ min: -1e4, max: 1e4, noNaN: true })), { maxLength: 40 }),
        (moves) => {
          let moved = band;
          for (const [isShort, days] of moves)
            moved = moveEdge(moved, isShort ? "shortestDays" : "longestDays", days, limits);
          expect(moved.shortestDays).toBeLessThan(moved.longestDays);
          expect(moved.shortestDays).toBeGreaterThanOrEqual(6);
          expect(moved.longestDays).toBeLessThanOrEqual(900);
          expect(Number.isInteger(moved.shortestDays) && Number.isInteger(moved.longestDays)).toBe(true);
        },
      ),
    );
  });

  test("a move that changes nothing gives back the same band, so that no history entry is made", () => {
    expect(moveEdge(band, "shortestDays", 90.4, limits)).toBe(band);
    expect(moveEdge(band, "shortestDays", Number.NaN, limits)).toBe(band);
  });

  test("other settings of the band are kept", () => {
    expect(moveEdge(band, "longestDays", 400, limits)).toEqual({ ...band, longestDays: 400 });
  });

  test("the range told to a screen reader is the range an edge can be dragged in", () => {
    for (const edge of ["shortestDays", "longestDays"] as const) {
      const [least, most] = edgeRange(band, edge, limits);
      expect(moveEdge(band, edge, -1e6, limits)[edge]).toBe(least);
      expect(moveEdge(band, edge, 1e6, limits)[edge]).toBe(most);
    }
  });

  test("a handle dragged half way across a logarithmic axis lands on the geometric mean of its ends", () => {
    const panel: PanelFrame = {
      id: "spectrum",
      x: 50,
      y: 0,
      width: 400,
      height: 100,
      horizontal: { kind: "log", from: 900, to: 9 },
      vertical: { kind: "linear", from: 1, to: 0 },
    };
    expect(moveEdge(band, "shortestDays", valueAtX(panel, 250), limits).shortestDays).toBe(90);
  });
});

describe("keys move an edge along a ladder of periods", () => {
  test("a step up and a step down are each other's inverse on every rung", () => {
    const rungs: number[] = [6];
    while (rungs[rungs.length - 1] < 1500) rungs.push(stepPeriod(rungs[rungs.length - 1], 1));
    for (let i = 1; i < rungs.length; i++) expect(stepPeriod(rungs[i], -1)).toBe(rungs[i - 1]);
  });

  test("every step moves, from rungs and from between them", () => {
    fc.assert(
      fc.property(fc.double({ min: 2, max: 5000, noNaN: true }), (days) => {
        expect(stepPeriod(days, 1)).toBeGreaterThan(days);
        expect(stepPeriod(days, -1)).toBeLessThan(days);
      }),
    );
  });
});

describe("open sides", () => {
  const limits = { leastDays: 6, mostDays: 900 };

  test("closing a side sets its usual period, or the nearest that limits and the other edge allow", () => {
    expect(closeSide({ shortestDays: null, longestDays: 540 }, "shortestDays", limits).shortestDays).toBe(90);
    expect(closeSide({ shortestDays: null, longestDays: 60 }, "shortestDays", limits).shortestDays).toBe(59);
    expect(closeSide({ shortestDays: 90, longestDays: null }, "longestDays", { leastDays: 6, mostDays: 200 })).toEqual({
      shortestDays: 90,
      longestDays: 200,
    });
  });

  test("a band is brought inside the limits of a record, its open sides left open", () => {
    const short = { leastDays: 6, mostDays: 200 };
    expect(fitBand({ shortestDays: 90, longestDays: 540 }, short)).toEqual({ shortestDays: 90, longestDays: 200 });
    expect(fitBand({ shortestDays: 300, longestDays: null }, short)).toEqual({ shortestDays: 200, longestDays: null });
    expect(fitBand({ shortestDays: 2, longestDays: 4 }, short)).toEqual({ shortestDays: 6, longestDays: 7 });
    const fits = { shortestDays: null, longestDays: 100 };
    expect(fitBand(fits, short)).toBe(fits);
  });

  test("a record of one date has limits all the same", () => {
    const { leastDays, mostDays } = recordLimits({ step: Number.NaN, values: [0] });
    expect(mostDays).toBeGreaterThan(leastDays);
  });
});
