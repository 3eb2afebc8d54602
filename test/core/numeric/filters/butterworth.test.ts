import { describe, expect, test } from "vitest";
import {
  type ButterworthSettings,
  butterworthSections,
  zeroPhaseResponse,
} from "../../../../core/numeric/filters/butterworth";
import { crossingPeriods } from "../../../../core/numeric/filters/crossing-periods";
import { FilterRefusal } from "../../../../core/numeric/filters/refusal";
import { expectClose } from "../../../expect-close";

const kinds: [string, Pick<ButterworthSettings, "shortestSamples" | "longestSamples">][] = [
  ["low-pass", { shortestSamples: 30, longestSamples: null }],
  ["high-pass", { shortestSamples: null, longestSamples: 180 }],
  ["band-pass", { shortestSamples: 30, longestSamples: 180 }],
];

/** 1 / (1 + W^2N) with W the prototype's frequency: |H|^2 of the analogue design at the prewarped frequency. */
function designedPower({ order, shortestSamples, longestSamples }: ButterworthSettings, f: number): number {
  const s = Math.tan(Math.PI * f);
  const [high, low] = [shortestSamples, longestSamples].map((period) => Math.tan(Math.PI / (period ?? 1)));
  let w = 0;
  if (shortestSamples === null) w = low / s;
  else if (longestSamples === null) w = s / high;
  else w = (s * s - low * high) / ((high - low) * s);
  return 1 / (1 + w ** (2 * order));
}

describe("Butterworth sections", () => {
  test.each(kinds)("%s of orders 1 to 8 have the closed-form response", (_, cuts) => {
    for (let order = 1; order <= 8; order++) {
      const settings = { order, ...cuts, cut: "half-amplitude" } as const;
      const sections = butterworthSections(settings);
      for (const f of [0.002, 1 / 180, 0.012, 1 / 60, 1 / 30, 0.07, 0.2, 0.45]) {
        expectClose(
          zeroPhaseResponse(sections, f),
          designedPower(settings, f),
          { absolute: 1e-9, because: "poles 0.03 from the unit circle cost four digits an order at low frequencies" },
          `order ${order} at ${f}`,
        );
      }
    }
  });

  test.each(kinds)("%s: forward and back leaves half the amplitude at the named periods", (_, cuts) => {
    for (const order of [2, 3, 4]) {
      const sections = butterworthSections({ order, ...cuts, cut: "half-amplitude" });
      const named = Object.values(cuts).filter((period) => period !== null);
      const found = crossingPeriods((f) => zeroPhaseResponse(sections, f), 0.5, 2.1, 5000);
      expect(found).toHaveLength(named.length);
      found.forEach((period, i) => {
        expectClose(period, named[i], { relative: 1e-9, because: "rounding in the sections" });
      });
    }
  });

  test.each(kinds)("%s: the other convention leaves half the power there", (_, cuts) => {
    for (const order of [2, 3, 4]) {
      const sections = butterworthSections({ order, ...cuts, cut: "half-power" });
      const named = Object.values(cuts).filter((period) => period !== null);
      const found = crossingPeriods((f) => zeroPhaseResponse(sections, f), Math.SQRT1_2, 2.1, 5000);
      expect(found).toHaveLength(named.length);
      found.forEach((period, i) => {
        expectClose(period, named[i], { relative: 1e-9, because: "rounding in the sections" });
      });
    }
  });

  test("padding is three times order + 1, for a band-pass three times twice the order + 1", () => {
    const pads = kinds.map(([, cuts]) =>
      [2, 3, 4].map((order) => butterworthSections({ order, ...cuts, cut: "half-power" })),
    );
    expect(pads.map((each) => each.map((s) => s.padSamples))).toEqual([
      [9, 12, 15],
      [9, 12, 15],
      [15, 21, 27],
    ]);
  });

  test.each([
    ["no cut-off", { order: 4, shortestSamples: null, longestSamples: null }, "at least one cut-off"],
    ["an order of 2.5", { order: 2.5, shortestSamples: 30, longestSamples: null }, "a whole number from 1 to 12"],
    ["a period of two samples", { order: 4, shortestSamples: 2, longestSamples: null }, "longer than two samples"],
    ["edges out of order", { order: 4, shortestSamples: 50, longestSamples: 30 }, "above the shortest of 50 samples"],
    ["a period that is no number", { order: 4, shortestSamples: Number.NaN, longestSamples: null }, "two samples"],
  ] as const)("%s is refused with what was expected", (_, cuts, words) => {
    const make = () => butterworthSections({ ...cuts, cut: "half-amplitude" });
    expect(make).toThrow(FilterRefusal);
    expect(make).toThrow(words);
  });
});
