import fc from "fast-check";
import { describe, expect, test } from "vitest";
import {
  fewestTicks,
  latitudeTicks,
  linearTicks,
  longitudeTicks,
  niceStep,
  periodTicks,
} from "../../../core/figure/ticks";

describe("fewest ticks", () => {
  test("a scale about zero is told by a round value on both sides, then one with zero, then one alone", () => {
    const labels = fewestTicks(-0.6, 0.6).map((list) => list.map((tick) => tick.label));
    expect(labels[0]).toEqual(["\u22120.5", "0.5"]);
    expect(labels).toContainEqual(["0", "0.5"]);
    expect(labels.at(-1)).toHaveLength(1);
  });

  test("a scale from zero has no value below it, and none of the lists leaves the scale", () => {
    for (const to of [3e-6, 0.07, 1, 9.9, 450]) {
      for (const list of [...fewestTicks(0, to), ...fewestTicks(-to, to)]) {
        for (const { value } of list) expect(Math.abs(value)).toBeLessThanOrEqual(to * (1 + 1e-9));
      }
      expect(
        fewestTicks(0, to)
          .flat()
          .every(({ value }) => value >= 0),
      ).toBe(true);
    }
  });
});

describe("linear ticks", () => {
  test("steps are 1, 2 or 5 times a power of ten and cut the span into no more pieces than asked for", () => {
    fc.assert(
      fc.property(fc.double({ min: 1e-9, max: 1e9, noNaN: true }), fc.integer({ min: 1, max: 20 }), (span, most) => {
        const step = niceStep(span, most);
        const mantissa = step / 10 ** Math.floor(Math.log10(step) + 1e-9);
        expect([1, 2, 5].some((nice) => Math.abs(mantissa - nice) < 1e-6)).toBe(true);
        expect(span / step).toBeLessThanOrEqual(most * (1 + 1e-6));
      }),
    );
  });

  test("labels carry the decimals of the step and a real minus", () => {
    expect(linearTicks(-0.6, 0.6, 5).map((tick) => tick.label)).toEqual(["\u22120.5", "0.0", "0.5"]);
    expect(linearTicks(-8, 8, 4).map((tick) => tick.label)).toEqual(["\u22125", "0", "5"]);
  });

  test("both ends are marked when they fall on a step, and a reversed scale gets the same ticks", () => {
    expect(linearTicks(0, 0.3, 3).map((tick) => tick.label)).toEqual(["0.0", "0.1", "0.2", "0.3"]);
    expect(linearTicks(10, 0, 5)).toEqual(linearTicks(0, 10, 5));
  });
});

describe("geographic ticks", () => {
  test("across the date line labels go on", () => {
    expect(longitudeTicks(170, 200, 3).map((tick) => tick.label)).toEqual(["170° E", "180°", "170° W", "160° W"]);
  });

  test("a globe is cut at thirds of a right angle or coarser", () => {
    expect(longitudeTicks(-180, 180, 6).map((tick) => tick.label)).toEqual([
      "180°",
      "120° W",
      "60° W",
      "0°",
      "60° E",
      "120° E",
      "180°",
    ]);
  });

  test("small regions get decimals", () => {
    expect(latitudeTicks(-0.6, 0.6, 3).map((tick) => tick.label)).toEqual(["0.5° S", "0.0°", "0.5° N"]);
  });
});

describe("period ticks", () => {
  test("run from long to short, within the scale, each at least the gap from the next", () => {
    const gap = 0.5;
    const ticks = periodTicks(900, 6, gap);
    const values = ticks.map((tick) => tick.value);
    expect(values).toContain(365);
    expect(values).toContain(90);
    expect(values.every((value, index) => index === 0 || Math.log(values[index - 1] / value) >= gap)).toBe(true);
    expect(Math.max(...values)).toBeLessThanOrEqual(900);
    expect(Math.min(...values)).toBeGreaterThanOrEqual(6);
    expect(ticks[0].label).toBe("730 d");
  });
});
