import fc from "fast-check";
import { describe, expect, test } from "vitest";
import type { TimeAxis } from "../../core/model/axis";
import { crossingDays, responseAt, timeFilter } from "../../core/study/band";
import { bandSettings } from "../../core/study/schema";
import type { TimeFilter } from "../../core/study/time-filter";
import { expectClose } from "../expect-close";

const dates = 4000;
const step = 3;
const time: TimeAxis = {
  kind: "time",
  values: Float64Array.from({ length: dates }, (_, t) => 20000 + step * t),
  step,
  even: true,
  periodic: false,
  calendar: "standard",
};

/** Amplitude that a sine of one metre keeps in the middle of a long record, by least squares on sine and cosine there. */
function measuredGain(filter: TimeFilter, periodDays: number, phase: number): number {
  const turn = (t: number) => (2 * Math.PI * step * (t - dates / 2)) / periodDays;
  const wave = Float64Array.from({ length: dates }, (_, t) => Math.sin(turn(t) + phase));
  const from = dates / 2 - 300;
  const filtered = filter.apply(
    wave,
    Int32Array.from({ length: 600 }, (_, i) => from + i),
  );
  let [ss, cc, sc, ys, yc] = [0, 0, 0, 0, 0];
  filtered.forEach((y, i) => {
    const [s, c] = [Math.sin(turn(from + i) + phase), Math.cos(turn(from + i) + phase)];
    ss += s * s;
    cc += c * c;
    sc += s * c;
    ys += y * s;
    yc += y * c;
  });
  const determinant = ss * cc - sc * sc;
  const [inPhase, across] = [(ys * cc - yc * sc) / determinant, (yc * ss - ys * sc) / determinant];
  expectClose(across, 0, { absolute: 1e-3, because: "no filter shifts a wave; what is left of the ends" }, "phase");
  return inPhase;
}

const edges = fc.record({
  shortestDays: fc.option(fc.double({ min: 12, max: 90, noNaN: true }), { freq: 4 }),
  ratio: fc.option(fc.double({ min: 2.5, max: 6, noNaN: true }), { freq: 4 }),
  order: fc.integer({ min: 1, max: 6 }),
  cut: fc.constantFrom("half-amplitude", "half-power"),
  phase: fc.double({ min: 0, max: 6, noNaN: true }),
});

describe.each(["lanczos", "butterworth", "running-mean"] as const)("%s", (kind) => {
  test("a sine at a displayed half-amplitude period keeps 0.5 (-6 dB), at a half-power one 0.707 (-3 dB), and at any the response", () => {
    let crossings = 0;
    fc.assert(
      fc.property(edges, ({ shortestDays, ratio, order, cut, phase }) => {
        const longestDays = ratio === null ? null : (shortestDays ?? 60) * ratio;
        if (shortestDays === null && longestDays === null) return;
        const filter = timeFilter(bandSettings.parse({ filter: kind, shortestDays, longestDays, order, cut }), time);
        if (!filter) throw new Error("no filter");
        const because = "a record of 12000 days: what is left of its ends in the middle";
        for (const level of [0.5, Math.SQRT1_2]) {
          for (const period of crossingDays(filter, level, time).filter((each) => each < 1000)) {
            crossings++;
            expectClose(
              measuredGain(filter, period, phase),
              level,
              { absolute: 1e-3, because },
              `${level} at ${period}`,
            );
          }
        }
        for (const period of [10, 40, 130, 400]) {
          const [shown] = responseAt(filter, Float64Array.of(1 / period), step);
          expectClose(measuredGain(filter, period, phase), shown, { absolute: 1e-3, because }, `at ${period} days`);
        }
      }),
      { numRuns: 25 },
    );
    expect(crossings).toBeGreaterThan(30);
  });
});

test("the half-power periods of a Butterworth filter set to half power are those asked for, those of half amplitude likewise", () => {
  for (const order of [1, 2, 4, 8]) {
    for (const [cut, level] of [
      ["half-power", Math.SQRT1_2],
      ["half-amplitude", 0.5],
    ] as const) {
      const settings = { filter: "butterworth", shortestDays: 45, longestDays: null, order, cut } as const;
      const filter = timeFilter(bandSettings.parse(settings), time);
      const found = filter ? crossingDays(filter, level, time) : [];
      expect(found.length).toBe(1);
      expectClose(
        found[0],
        45,
        { relative: 1e-9, because: "prewarping puts the cut exactly there" },
        `${cut} ${order}`,
      );
    }
  }
});

test("a band as narrow as 0.001 to 0.002 cycles a sample stays finite and keeps its response", () => {
  const long: TimeAxis = { ...time, values: Float64Array.from({ length: 40000 }, (_, t) => t), step: 1 };
  const settings = { filter: "butterworth", shortestDays: 500, longestDays: 1000, order: 5 } as const;
  const filter = timeFilter(bandSettings.parse(settings), long);
  const wave = Float64Array.from({ length: 40000 }, (_, t) => Math.sin((2 * Math.PI * t) / 707));
  const out = filter?.apply(wave) ?? new Float64Array(0);
  expect(out.every(Number.isFinite)).toBe(true);
  const kept = out.subarray(19000, 21000).reduce((most, value) => Math.max(most, Math.abs(value)), 0);
  expectClose(kept, 1, { absolute: 2e-3, because: "flat in the middle of the band; ends 19000 samples away" });
  const asked = [500, 1000];
  crossingDays(filter as TimeFilter, 0.5, long).forEach((period, i) => {
    expectClose(period, asked[i], { relative: 1e-6, because: "prewarped cuts" });
  });
});
