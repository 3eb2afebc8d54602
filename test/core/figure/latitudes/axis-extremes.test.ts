import { describe, expect, test } from "vitest";
import type { LatitudesInput } from "../../../../core/figure/latitudes/input";
import { latitudesScene } from "../../../../core/figure/latitudes-figure";
import { pixelX } from "../../../../core/figure/panel";
import { makeTimeAxis } from "../../../../core/model/axis";
import { madeUpInput } from "./made-up-record";

const wide = { width: 1440, height: 900 };
const input = madeUpInput();
const scene = latitudesScene(input, wide);

function changed(result: Partial<LatitudesInput["result"]>, rest: Partial<LatitudesInput> = {}): LatitudesInput {
  return { ...input, ...rest, result: { ...input.result, ...result } };
}

describe("an uneven record", () => {
  // Dates 3 days apart, with 60 days from the 100th to the 101st.
  const times = Float64Array.from({ length: 300 }, (_, date) => 22339 + 3 * date + (date > 99 ? 57 : 0));
  const hasData = new Uint8Array(300).fill(1);
  const uneven = {
    ...input,
    record: { ...input.record, hasData, time: makeTimeAxis(times, "standard", "made up") },
  };
  const drawn = latitudesScene(uneven, wide);

  test("a hole between two dates is a gap in the strip of days, half a step from the dates beside it", () => {
    const strip = drawn.panels.find(({ id }) => id === "days");
    const holes = drawn.marks.find(({ id }) => id === "days-holes");
    if (!strip || holes?.kind !== "path") throw new Error("no holes");
    const [left, right] = [...holes.d.matchAll(/^M(-?[\d.]+)|H(-?[\d.]+)V/g)].map((match) =>
      Number(match[1] ?? match[2]),
    );
    // Path data are rounded to hundredths of a pixel, edges and width each.
    expect(Math.abs(left - pixelX(strip, times[99] + 1.5))).toBeLessThan(0.021);
    expect(Math.abs(right - pixelX(strip, times[100] - 1.5))).toBeLessThan(0.021);
  });

  test("an even record has no holes", () => {
    expect(scene.marks.map((mark) => mark.id)).not.toContain("days-holes");
  });
});

describe("zonal means", () => {
  test.each([0.0006, 0.003, 0.0059, 0.012, 0.058, 0.6, 3, 11])("an axis to %d m/s has two labels at least", (reach) => {
    const flat = new Float64Array(input.result.onDate.length);
    const mean = flat.map((_, row) => (row === 3 ? reach : 0));
    for (const signed of [true, false]) {
      for (const size of [wide, { width: 640, height: 480 }, { width: 1100, height: 700 }]) {
        const quantity = { ...input.quantity, signed };
        const drawn = latitudesScene(changed({ onDate: flat, profile: { mean, half95: flat } }, { quantity }), size);
        const labels = drawn.marks.filter((mark) => /^zonal-mean-x-\d/.test(mark.id));
        expect(labels.length).toBeGreaterThanOrEqual(2);
        const negative = labels.filter((mark) => mark.kind === "text" && mark.text.startsWith("\u2212"));
        const zero = labels.filter((mark) => mark.kind === "text" && Number(mark.text) === 0);
        // Either side of zero has as many labels, unless zero and one value are all there is room for.
        const positive = labels.length - negative.length - zero.length;
        if (signed && labels.length > 2) expect(negative.length).toBe(positive);
      }
    }
  });
});
