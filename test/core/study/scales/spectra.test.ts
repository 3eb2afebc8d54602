import { describe, expect, test } from "vitest";
import { randomStream } from "../../../../core/numeric/statistics/random";
import { welchSpectrum } from "../../../../core/numeric/welch";
import { energyByPeriod, varianceBetween, withInterval } from "../../../../core/study/scales/energy-by-period";
import { energyPlane } from "../../../../core/study/scales/energy-plane";
import { mapSpectra } from "../../../../core/study/scales/map-spectra";
import { peakOfDates, peakWavelength } from "../../../../core/study/scales/peak-wavelength";
import { expectClose } from "../../../expect-close";

const [rows, columns] = [120, 160];
const spacing = { east: new Float64Array(rows).fill(20_000), eastAtMiddle: 20_000, north: 20_000 };

/** Velocity of the stream function cos(kx + ly): wavelengths in metres, whole waves in the plane. */
function waveFlow(zonal: number, meridional: number): { u: Float64Array; v: Float64Array } {
  const [k, l] = [(2 * Math.PI) / zonal, (2 * Math.PI) / meridional];
  const phase = (i: number) => k * 20_000 * (i % columns) + l * 20_000 * Math.floor(i / columns);
  const make = (factor: number) => Float64Array.from({ length: rows * columns }, (_, i) => factor * Math.sin(phase(i)));
  return { u: make(l * 1e4), v: make(-k * 1e4) };
}

describe("spectra of one map", () => {
  test("a plane wave peaks at its own wavelengths along both directions", () => {
    const { u, v } = waveFlow(800_000, 300_000);
    const { zonal, meridional } = mapSpectra(u, v, spacing);
    const because = "a parabola on the three bins of a Hann window";
    expectClose(peakWavelength(zonal.wavenumber, zonal.density), 800_000, { relative: 0.06, because });
    expectClose(peakWavelength(meridional.wavenumber, meridional.density), 300_000, { relative: 0.02, because });
  });

  test("the plane of energy holds the mean of (u² + v²) / 2", () => {
    const { u, v } = waveFlow(800_000, 300_000);
    const { energy } = mapSpectra(u, v, spacing);
    const integral =
      (energy ?? new Float64Array(0)).reduce((sum, value) => sum + value, 0) / (rows * columns * 20_000 * 20_000);
    const mean = u.reduce((sum, value, i) => sum + (value ** 2 + v[i] ** 2) / 2, 0) / u.length;
    expectClose(integral, mean, {
      relative: 0.01,
      because: "a Hann window is right on average, for whole waves nearly",
    });
  });

  test("land on more than half of the map leaves no plane", () => {
    const { u, v } = waveFlow(800_000, 300_000);
    const half = (plane: Float64Array) => plane.map((value, i) => (i % columns > 60 ? Number.NaN : value));
    expect(mapSpectra(half(u), half(v), spacing).energy).toBeNull();
  });

  test("zonal jets lie outside the wave boundary, long zonal waves inside", () => {
    const share = (zonal: number, meridional: number) => {
      const { u, v } = waveFlow(zonal, meridional);
      return energyPlane(mapSpectra(u, v, spacing).energy ?? u, spacing, 0.05, 2e-11).shareInside;
    };
    // sqrt(U / beta) is 50 km: the boundary crosses the zonal axis at a wavelength of 314 km.
    expect(share(3_200_000, 300_000)).toBeLessThan(0.05);
    expect(share(800_000, 2_400_000)).toBeGreaterThan(0.95);
  });

  test("the boundary drawn is K² = (beta / U) cos(angle), in cycles a metre", () => {
    const { boundary } = energyPlane(new Float64Array(rows * columns).fill(1), spacing, 0.1, 2e-11);
    boundary.zonal.forEach((k, i) => {
      const square = k ** 2 + boundary.meridional[i] ** 2;
      if (square === 0) return;
      const wanted = (2e-10 / (4 * Math.PI ** 2)) * (k / Math.sqrt(square));
      expectClose(square, wanted, { relative: 1e-9, absolute: 1e-20, because: "algebra" });
    });
  });

  test("the share inside for white noise is the boundary's own share of the wavenumber plane", () => {
    const [speed, beta] = [0.002, 2e-11];
    // Area of both lobes: 2 × (1/2) ∫ (beta / U) cos(angle) d(angle) = 2 beta / U, over the plane's (2 pi / 20 km)².
    const wanted = (2 * beta) / speed / ((2 * Math.PI) / 20_000) ** 2;
    const { shareInside } = energyPlane(new Float64Array(rows * columns).fill(1), spacing, speed, beta);
    expectClose(shareInside, wanted, { relative: 0.02, because: "cells of 1 % of the plane's width" });
  });
});

test("the peak of many dates has limits that hold the true wavelength and are narrower than the octave", () => {
  const random = randomStream(5);
  const wavenumber = Float64Array.from({ length: 60 }, (_, k) => k / 3_000_000);
  const densities = Array.from({ length: 40 }, () =>
    wavenumber.map((value) => {
      const shape = Math.exp(-((Math.log(value * 300_000) / 0.4) ** 2)) / (value || 1);
      return shape * -Math.log(1 - random.uniform());
    }),
  );
  const { value, low95, high95 } = peakOfDates(wavenumber, densities);
  expect(low95).toBeLessThanOrEqual(300_000);
  expect(high95).toBeGreaterThanOrEqual(300_000);
  expect(1 / low95 - 1 / value).toBeGreaterThanOrEqual(0.999 / 6_000_000);
  expect(1 / value - 1 / high95).toBeGreaterThanOrEqual(0.999 / 6_000_000);
  expect(high95 / low95).toBeLessThan(2);
  expect(peakOfDates(wavenumber, densities)).toEqual({ value, low95, high95 });
});

describe("energy by period", () => {
  const series = (periodDays: number, amplitude: number) =>
    Float64Array.from({ length: 2000 }, (_, day) => amplitude * Math.cos((2 * Math.PI * day) / periodDays));
  const spectrum = (values: Float64Array) => {
    const { frequency, density, segments } = welchSpectrum(values, 1, {
      segment: 1000,
      overlap: 0.5,
      detrend: "constant",
    });
    return { quantity: "u", frequency, density, segments, segmentDays: 1000, window: "Hann", units: "" };
  };

  test("cosines of 10, 100 and 1000 days and a mean fall to weeks, months and longer", () => {
    const none = spectrum(new Float64Array(2000));
    const u = series(10, 0.2).map((value, i) => value + series(100, 0.4)[i]);
    // Mean energy: 0.2²/4 + 0.4²/4 of the cosines, and 0.3²/2 of a mean flow.
    const shares = energyByPeriod(0.01 + 0.04 + 0.045, [spectrum(u), none], 30, 540);
    const because = "Hann's leakage over its bins";
    expectClose(shares.weeksShare, 0.01 / 0.095, { relative: 0.01, because });
    expectClose(shares.monthsShare, 0.04 / 0.095, { relative: 0.01, because });
    expectClose(shares.longerShare, 0.045 / 0.095, { relative: 0.02, because });
  });

  test("variances between touching frequencies add up to the whole", () => {
    const whole = spectrum(series(17, 1).map((value, i) => value + 0.3 * series(3.1, 1)[i]));
    const cuts = [0, 0.0123, 0.07, 0.31, 1];
    const parts = cuts.slice(1).map((high, i) => varianceBetween(whole, cuts[i], high));
    const sum = whole.density.reduce((total, value) => total + value, 0) * whole.frequency[1];
    expectClose(
      parts.reduce((total, value) => total + value, 0),
      sum,
      { relative: 1e-12, because: "every bin is shared out whole" },
    );
  });

  test("limits of one segment are those of two degrees of freedom, of many segments close in", () => {
    const wide = withInterval({ ...spectrum(series(17, 1)), segments: 1 }, 1);
    expectClose(wide.lowFactor, 2 / 7.377759, { relative: 1e-6, because: "chi-squared table, 2 degrees" });
    const close = withInterval({ ...spectrum(series(17, 1)), segments: 60 }, 1);
    expect(close.lowFactor).toBeGreaterThan(0.7);
  });
});
