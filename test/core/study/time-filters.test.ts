import fc from "fast-check";
import { describe, expect, test } from "vitest";
import type { TimeAxis } from "../../../core/model/axis";
import { bridgedDates, crossingDays, timeFilter } from "../../../core/study/band";
import { bandSettings } from "../../../core/study/schema";
import { expectAllClose, expectClose } from "../../expect-close";

const dates = 400;
const time: TimeAxis = {
  kind: "time",
  values: Float64Array.from({ length: dates }, (_, t) => 22000 + 3 * t),
  step: 3,
  even: true,
  periodic: false,
  calendar: "standard",
};

const kinds = [
  ["Lanczos band", { filter: "lanczos", shortestDays: 60, longestDays: 240 }],
  ["Lanczos low-pass", { filter: "lanczos", shortestDays: 60, longestDays: null }],
  ["Lanczos high-pass", { filter: "lanczos", shortestDays: null, longestDays: 240 }],
  ["Butterworth band", { filter: "butterworth", shortestDays: 60, longestDays: 240, order: 3 }],
  ["Butterworth low-pass", { filter: "butterworth", shortestDays: 60, longestDays: null }],
  ["running means", { filter: "running-mean", shortestDays: 30, longestDays: 120 }],
] as const;

const filterOf = (settings: object) => {
  const filter = timeFilter(bandSettings.parse({ bridgeDays: 15, ...settings }), time);
  if (!filter) throw new Error("no filter");
  return filter;
};

/** A wandering series with short gaps (bridged) and one long one. */
const gappy = Float64Array.from({ length: dates }, (_, t) => {
  const missing = t === 20 || (t > 60 && t < 64) || (t >= 150 && t < 170) || t === 390;
  return missing ? Number.NaN : Math.sin(t / 4) + 0.7 * Math.cos(t / 17) + 0.3 * ((t * 37) % 11);
});
const known = Uint8Array.from(gappy, (value) => (Number.isNaN(value) ? 0 : 1));

describe.each(kinds)("%s", (_, settings) => {
  const filter = filterOf(settings);

  test("one date's weights times the record equal the filtered series there, ends and gaps included", () => {
    const whole = filter.apply(gappy);
    for (const date of [0, 1, 19, 62, 100, 149, 170, 250, 399]) {
      const row = filter.row(known, date);
      const value = row ? row.reduce((sum, weight, t) => (known[t] ? sum + weight * gappy[t] : sum), 0) : Number.NaN;
      if (known[date])
        expectClose(value, whole[date], { absolute: 1e-10, because: "the same weights, summed otherwise" }, `${date}`);
      row?.forEach((weight, t) => {
        if (!known[t]) expect(weight, `weight on missing date ${t}`).toBe(0);
      });
    }
  });

  test("never reaches across a gap longer than what is bridged", () => {
    const changed = gappy.map((value, t) => (t >= 170 ? 5 - 3 * value : value));
    const [before, after] = [filter.apply(gappy), filter.apply(changed)];
    for (let t = 0; t < 150; t++) expect(after[t]).toBe(before[t]);
    for (let t = 155; t < 165; t++) expect(before[t]).toBeNaN();
  });

  test("gives the samples asked for as it gives all", () => {
    const at = Int32Array.from([0, 5, 120, 155, 300]);
    const all = filter.apply(gappy);
    expectAllClose(
      filter.apply(gappy, at),
      [...at].map((t) => all[t]),
      { absolute: 1e-12, because: "same sums" },
    );
  });

  test("passes a long sinusoid with the amplitude its response says", () => {
    for (const period of [30, 90, 150, 400]) {
      const wave = Float64Array.from({ length: dates }, (_, t) => Math.sin((2 * Math.PI * 3 * (t - 200)) / period));
      const out = filter.apply(wave);
      // Where the filter's own reach lies inside the record; an IIR filter forgets exponentially.
      for (let t = 180; t < 220; t++) {
        expectClose(out[t], filter.response(3 / period) * wave[t], {
          absolute: 6e-3,
          because: "what is left of the ends at 180 samples",
        });
      }
    }
  });

  test("marks its ends and the dates it bridges, and is linear", () => {
    const ends = filter.ends(new Uint8Array(dates).fill(1));
    expect(ends[0]).toBe(1);
    expect(ends[200]).toBe(0);
    const share = filter.share(known);
    expectClose(filter.share(new Uint8Array(dates).fill(1))[200], 1, {
      absolute: 5e-3,
      because: "what of a recursive filter's weight lies beyond 200 samples",
    });
    expect(share[0]).toBeLessThan(0.9);
    expect(share[160]).toBe(0);
    fc.assert(
      fc.property(fc.double({ min: -4, max: 4, noNaN: true }), (factor) => {
        const scaled = filter.apply(gappy.map((value) => factor * value));
        expectAllClose(
          scaled,
          filter.apply(gappy).map((value) => factor * value),
          { absolute: 1e-9, because: "rounding" },
        );
      }),
      { numRuns: 20 },
    );
  });
});

test("half-amplitude periods found from the response are the named ones (Butterworth: exactly -6 dB net)", () => {
  const butterworth = filterOf({ filter: "butterworth", shortestDays: 60, longestDays: 240, order: 4 });
  const [short, long] = crossingDays(butterworth, 0.5, time);
  expectClose(short, 60, {
    relative: 1e-3,
    because: "prewarped cut-offs; band edges of an analogue design meet half amplitude",
  });
  expectClose(long, 240, { relative: 1e-3, because: "same" });
  const power = filterOf({ filter: "butterworth", shortestDays: 60, longestDays: null, order: 4, cut: "half-power" });
  expectClose(crossingDays(power, Math.SQRT1_2, time)[0], 60, {
    relative: 2e-3,
    because: "-3 dB net by moving the cut",
  });
});

test("bridged dates are those in gaps up to the set length", () => {
  const flags = bridgedDates(bandSettings.parse({ bridgeDays: 15 }), { time, hasData: known });
  expect([20, 61, 63, 155, 390].map((t) => flags[t])).toEqual([1, 1, 1, 0, 1]);
});
