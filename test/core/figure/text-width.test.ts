import { describe, expect, test } from "vitest";
import { fittingText, superscriptRuns, textWidth } from "../../../core/figure/text-width";

describe("text width", () => {
  test("figures are tabular: every number of as many digits is equally wide", () => {
    expect(textWidth("1111", 10, 400)).toBe(textWidth("8888", 10, 400));
  });

  test("width grows with the type and bold is wider", () => {
    expect(textWidth("Zonal mean", 20, 400)).toBeCloseTo(2 * textWidth("Zonal mean", 10, 400), 9);
    expect(textWidth("Zonal mean", 10, 700)).toBeGreaterThan(textWidth("Zonal mean", 10, 400));
  });

  test("superscripts become raised figures with a real minus", () => {
    expect(superscriptRuns("cm s⁻¹, all")).toEqual([
      { text: "cm s", raised: false },
      { text: "−1", raised: true },
      { text: ", all", raised: false },
    ]);
  });

  test("the longest candidate that fits is taken, the last is shortened", () => {
    expect(fittingText(["a long remark", "short"], 60, 10)).toBe("short");
    const cut = fittingText(["Eastward velocity"], 50, 10);
    expect(cut.endsWith("…")).toBe(true);
    expect(textWidth(cut, 10, 400)).toBeLessThanOrEqual(50);
    expect(fittingText(["anything"], 2, 10)).toBe("");
  });
});
