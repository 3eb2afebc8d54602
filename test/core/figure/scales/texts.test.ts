import { describe, expect, test } from "vitest";
import { estimateText, powerText } from "../../../../core/figure/scales/estimate-text";
import { signChangesText } from "../../../../core/figure/scales/profile-panels";
import { logWavelengthTicks, wavelengthTicks } from "../../../../core/figure/scales/wavelength-ticks";
import { wrapText } from "../../../../core/figure/scales/wrap-text";
import { textWidth } from "../../../../core/figure/text-width";

describe("estimates", () => {
  test.each([
    [{ value: -0.024, low95: -0.027, high95: -0.021 }, 100, "−2.4 ± 0.3"],
    [{ value: 240_000, low95: 228_000, high95: 252_000 }, 0.001, "240 ± 12"],
    [{ value: 0.6, low95: 0.4, high95: 1.4 }, 1, "0.6 (0.4 to 1.4)"],
    [{ value: 232_123, low95: Number.NaN, high95: Number.NaN }, 0.001, "232"],
    [{ value: Number.NaN, low95: 0, high95: 1 }, 1, "unknown"],
  ])("%j times %d reads %s", (estimate, scale, text) => {
    expect(estimateText(estimate, scale)).toBe(text);
  });

  test.each([
    [{ value: 3.1e-9, low95: 2.2e-9, high95: 4e-9 }, "(3.1 ± 0.9) × 10⁻⁹"],
    [{ value: -2e-4, low95: Number.NaN, high95: Number.NaN }, "−2 × 10⁻⁴"],
    [{ value: 0, low95: 0, high95: 0 }, "0"],
    [{ value: Number.NaN, low95: Number.NaN, high95: Number.NaN }, "unknown"],
  ])("%j in powers of ten reads %s", (estimate, text) => {
    expect(powerText(estimate)).toBe(text);
  });
});

describe("wavelength ticks", () => {
  test("stand at the wavenumber of the wavelength they name, alike on both sides of ∞", () => {
    const ticks = wavelengthTicks(-1 / 100_000, 1 / 100_000, " km", (each) => each.length <= 7);
    expect(ticks.map(({ label }) => label)).toContain("∞");
    for (const { value, label } of ticks) {
      if (label !== "∞") expect(1000 * Number.parseInt(label, 10) * Math.abs(value)).toBeCloseTo(1, 9);
    }
    expect(ticks.map(({ label }) => label)).toEqual(ticks.map(({ label }) => label).reverse());
  });

  test("logarithmic ones keep apart and stay inside", () => {
    const ticks = logWavelengthTicks(2_400_000, 60_000, 0.5);
    expect(ticks.length).toBeGreaterThan(2);
    for (const [index, { value }] of ticks.entries()) {
      expect(value <= 2_400_000 && value >= 60_000).toBe(true);
      if (index > 0) expect(Math.log(ticks[index - 1].value / value)).toBeGreaterThanOrEqual(0.5);
    }
  });
});

test("wrapped lines fit, lose no word, and end with an ellipsis where there are too many", () => {
  const sentence = "No spectrum by period: fewer than 16 dates an even step apart, or gaps in every segment.";
  const lines = wrapText(sentence, 150, 12, 20);
  expect(lines.join(" ")).toBe(sentence);
  for (const line of lines) expect(textWidth(line, 12, 400)).toBeLessThanOrEqual(150);
  const cut = wrapText(sentence, 150, 12, 2);
  expect(cut).toHaveLength(2);
  expect(cut[1].endsWith("…")).toBe(true);
});

test.each([
  [[], "none at this resolution"],
  [[24.13], "at 24.1° N"],
  [[24.13, -3.2], "at 24.1° N and 3.2° S"],
  [[22.1, 25, 38.9], "3, from 22.1° N to 38.9° N"],
])("sign changes at %j read %s", (latitudes, text) => {
  expect(signChangesText(latitudes)).toBe(text);
});
