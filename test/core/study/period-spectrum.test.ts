import { describe, expect, test } from "vitest";
import { backgroundBasis } from "../../../core/numeric/background";
import { regionSpectrum, unevenRegionSpectrum } from "../../../core/study/period-spectrum";
import { spectrumSettings } from "../../../core/study/schema";
import { expectClose } from "../../expect-close";

const u = { id: "u", units: "m s-1" };
const none = { mean: true, trend: false, annual: false, semiannual: false };
const weights = Float64Array.of(1, 1);

/** Two cells: a wave of 60 days of amplitude 0.2 and one of 90 days of 0.1. */
const waves = (days: Float64Array) =>
  Float64Array.from([
    ...days.map((d) => 0.2 * Math.sin((2 * Math.PI * d) / 60)),
    ...days.map((d) => 0.1 * Math.cos((2 * Math.PI * d) / 90)),
  ]);
const variance = (0.2 ** 2 / 2 + 0.1 ** 2 / 2) / 2;
const integral = ({ frequency, density }: { frequency: Float64Array; density: Float64Array }) =>
  density.reduce((sum, value) => sum + value, 0) * (frequency[1] - frequency[0]);

describe("the region's spectrum by period", () => {
  const even = Float64Array.from({ length: 360 }, (_, t) => 3 * t);
  test.each(spectrumSettings.shape.taper.unwrap().options)(
    "with the taper %s its integral is the variance and its peak the wave's period",
    (taper) => {
      const settings = spectrumSettings.parse({ taper });
      const result = regionSpectrum(u, waves(even), weights, 3, backgroundBasis(even, none, 365.2425), settings);
      expectClose(integral(result), variance, {
        relative: 0.02,
        because: "waves that fit the record nearly; a taper's leakage",
      });
      const peak = result.density.indexOf(Math.max(...result.density));
      expectClose(1 / result.frequency[peak], 60, {
        relative: 0.08,
        because: "the spacing of frequencies, and multitapers' width",
      });
    },
  );

  test("uneven dates give the same period and variance by Lomb-Scargle", () => {
    const days = even.map((day, t) => day + 1.3 * Math.sin(t * 7.7));
    const result = unevenRegionSpectrum(u, waves(days), weights, days, backgroundBasis(days, none, 365.2425));
    const peak = result.density.indexOf(Math.max(...result.density));
    expectClose(1 / result.frequency[peak], 60, { relative: 0.03, because: "the spacing of frequencies" });
    expectClose(integral(result), variance, { relative: 0.05, because: "waves that fit the record nearly" });
    expect(result.window).toContain("Lomb-Scargle");
  });
});

test("a gap too long to bridge shortens the segments instead of taking the spectrum away", () => {
  const days = Float64Array.from({ length: 360 }, (_, t) => 3 * t);
  const gappy = waves(days).map((value, i) => (i % 360 >= 200 && i % 360 < 220 ? Number.NaN : value));
  const result = regionSpectrum(u, gappy, weights, 3, backgroundBasis(days, none, 365.2425));
  expect(result.segmentDays).toBe(600);
  const peak = result.density.indexOf(Math.max(...result.density));
  expectClose(1 / result.frequency[peak], 60, { relative: 0.08, because: "the spacing of frequencies" });
});

test("cells without a stretch of eight samples give no spectrum rather than an invented one", () => {
  const days = Float64Array.from({ length: 120 }, (_, t) => 3 * t);
  const holes = waves(days).map((value, i) => (i % 120 < 4 ? value : Number.NaN));
  const result = regionSpectrum(u, holes, weights, 3, backgroundBasis(days, none, 365.2425));
  expect(result.frequency.length).toBe(0);
  expect(result.segments).toBe(0);
});

test("the longest stretch gives its segment wherever it lies", () => {
  const days = Float64Array.from({ length: 158 }, (_, t) => 7 * t);
  const gappy = waves(days).map((value, i) => (i % 158 >= 70 && i % 158 < 78 ? Number.NaN : value));
  const result = regionSpectrum(u, gappy, weights, 7, backgroundBasis(days, none, 365.2425));
  expect(result.segmentDays).toBe(80 * 7);
  expect(result.segments).toBe(1);
  expect(result.density.every(Number.isFinite)).toBe(true);
});
