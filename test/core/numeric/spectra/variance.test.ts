import { describe, expect, test } from "vitest";
import { frequencyWavenumberSpectrum } from "../../../../core/numeric/spectra/frequency-wavenumber";
import { planeSpectrum } from "../../../../core/numeric/spectra/plane";
import { redNoiseCoefficient, redNoiseDensity } from "../../../../core/numeric/spectra/red-noise";
import { type Taper, taperName } from "../../../../core/numeric/spectra/tapers";
import {
  averageSpectra,
  meridionalSpectrum,
  perKilometre,
  type WavenumberSettings,
  zonalSpectrum,
} from "../../../../core/numeric/spectra/wavenumber";
import { welchSpectrum } from "../../../../core/numeric/welch";
import { expectClose } from "../../../expect-close";
import { noise } from "./noise";

const every: Taper[] = [
  { kind: "boxcar" },
  { kind: "hann" },
  { kind: "hamming" },
  { kind: "cosine", share: 0.3 },
  { kind: "sine", count: 4 },
];
const named = every.map((taper) => [taperName(taper), taper] as const);
const rounding = { relative: 1e-12, because: "float64 sums of some hundred terms" };
const sum = (values: Float64Array) => values.reduce((total, value) => total + value, 0);
const meanSquare = (values: Float64Array) => values.reduce((total, value) => total + value * value, 0) / values.length;

describe("the integral of every spectrum is the variance", () => {
  test.each(named)("by period, each piece scaled to its variance: %s", (_, taper) => {
    for (const length of [64, 75]) {
      const series = noise(length, 3);
      const settings = { segment: length, overlap: 0, detrend: "constant", taper, scaling: "variance" } as const;
      const { density, frequency } = welchSpectrum(series, 5, settings);
      const mean = sum(series) / length;
      expectClose(sum(density) * frequency[1], meanSquare(series.map((value) => value - mean)), rounding);
    }
  });

  test.each(named)("by period, for a wave that fits the segment, without that scaling: %s", (_, taper) => {
    const wave = Float64Array.from({ length: 512 }, (_, i) => 0.05 * Math.sin((2 * Math.PI * 40 * i) / 512));
    const { density, frequency } = welchSpectrum(wave, 6.2, { segment: 512, overlap: 0.5, detrend: "none", taper });
    const wanted = 0.00125;
    // Sine tapers repeat after one sample more than the segment, and let a trace of twice the wave through.
    const relative = taper.kind === "sine" ? 1e-5 : 1e-6;
    const close = { relative, because: "squared weights hold next to no power at twice the wave" };
    expectClose(sum(density) * frequency[1], wanted, close);
  });

  test.each(named)("along rows and columns: %s", (_, taper) => {
    const [rows, columns] = [14, 21];
    const plane = noise(rows * columns, 5);
    const settings = { taper, detrend: "none", bridgedCells: 0, leastShare: 1, scaling: "variance" } as const;
    const spacingMetres = new Float64Array(rows).fill(25000);
    for (const { density, wavenumber } of [
      zonalSpectrum(plane, { columns, spacingMetres }, settings),
      meridionalSpectrum(plane, { rows, spacingMetres: 28000 }, settings),
    ]) {
      expectClose(sum(density) * wavenumber[1], meanSquare(plane), rounding);
    }
  });

  test("along rows whose spacing narrows poleward, weighted, and averaged over dates", () => {
    const [rows, columns] = [20, 33];
    const spacingMetres = Float64Array.from({ length: rows }, (_, i) => 27800 * Math.cos(((20 + i) * Math.PI) / 180));
    const weights = spacingMetres.map((spacing) => spacing / 27800);
    const settings: WavenumberSettings = { taper: { kind: "boxcar" }, detrend: "none", bridgedCells: 0, leastShare: 1 };
    const dates = [noise(rows * columns, 8), noise(rows * columns, 9)];
    const spectra = dates.map((plane) => zonalSpectrum(plane, { columns, spacingMetres, weights }, settings));
    const mean = averageSpectra(spectra);
    let variance = 0;
    for (const plane of dates) {
      for (let row = 0; row < rows; row++) {
        variance += weights[row] * meanSquare(plane.slice(row * columns, (row + 1) * columns));
      }
    }
    variance /= 2 * sum(weights);
    expectClose(sum(mean.density) * mean.wavenumber[1], variance, rounding);
    expectClose(mean.resolvedByAll, 0.5 / spacingMetres[0], rounding, "the widest row's Nyquist wavenumber");
    expect(mean.lines).toBe(2 * rows);
    const kilometres = perKilometre(mean);
    expectClose(sum(kilometres.density) * kilometres.wavenumber[1], variance, rounding, "in kilometres");
  });

  test.each(named)("of a plane and of a time-longitude matrix, gaps included: %s", (_, taper) => {
    for (const [rows, columns] of [
      [12, 15],
      [9, 16],
    ] as const) {
      const values = noise(rows * columns, 21);
      values[17] = Number.NaN;
      values[40] = Number.NaN;
      const settings = { taper, detrend: "none", bridgedCells: 0, leastShare: 0.9, scaling: "variance" } as const;
      const given = { values, rows, columns, rowStep: 27800, columnStep: 23500 };
      const wanted = meanSquare(values.filter((value) => !Number.isNaN(value)));
      const plane = planeSpectrum(given, settings);
      const cell = 1 / (rows * 27800 * columns * 23500);
      expectClose(sum(plane.density) * cell, wanted, rounding, "plane");
      const moving = frequencyWavenumberSpectrum(given, settings);
      expectClose(sum(moving.density) * cell, wanted, rounding, "matrix");
      expectClose(plane.share, 1 - 2 / values.length, rounding, "share");
    }
  });

  test("of red noise", () => {
    const count = 200000;
    const frequency = Float64Array.from({ length: count }, (_, i) => ((i + 0.5) / count) * (1 / 14));
    const density = redNoiseDensity(0.8, 3, frequency, 7);
    expectClose(sum(density) / count / 14, 3, { relative: 1e-9, because: "midpoint rule on a periodic function" });
    expectClose(redNoiseCoefficient(0.9, 0.81), 0.9, rounding, "the coefficient of AR(1) lags");
    expectClose(redNoiseCoefficient(0.3, -0.1), 0.3, rounding, "a negative second lag has no root");
  });
});
