import { describe, expect, test } from "vitest";
import { frequencyWavenumberSpectrum } from "../../../../core/numeric/spectra/frequency-wavenumber";
import { planeSpectrum } from "../../../../core/numeric/spectra/plane";
import { type WavenumberSettings, zonalSpectrum } from "../../../../core/numeric/spectra/wavenumber";
import { expectAllClose, expectClose } from "../../../expect-close";
import { noise } from "./noise";

const rounding = { relative: 1e-12, because: "float64 sums of some hundred terms" };

describe("where waves lie", () => {
  const settings: WavenumberSettings = { taper: { kind: "hann" }, detrend: "none", bridgedCells: 0, leastShare: 1 };
  const [rows, columns] = [40, 30];
  const wave = (k: number, l: number) =>
    Float64Array.from({ length: rows * columns }, (_, cell) =>
      Math.cos(2 * Math.PI * ((k * (cell % columns)) / columns - (l * Math.floor(cell / columns)) / rows)),
    );
  const peak = (density: Float64Array) => density.indexOf(density.reduce((a, b) => Math.max(a, b)));

  test("a westward wave lies at negative wavenumber and positive frequency, an eastward one mirrored", () => {
    for (const k of [-4, 4]) {
      const given = { values: wave(k, 7), rows, columns, rowStep: 5, columnStep: 20000 };
      const { density, frequency, wavenumber } = frequencyWavenumberSpectrum(given, settings);
      const at = peak(density);
      expectClose(frequency[Math.floor(at / columns)], 7 / (rows * 5), rounding, "frequency");
      expectClose(wavenumber[at % columns], k / (columns * 20000), rounding, "wavenumber");
    }
  });

  test("positions that fall along the columns (north to south) change nothing in the result", () => {
    const values = noise(rows * columns, 2);
    const turned = values.map((_, cell) => values[cell - (cell % columns) + columns - 1 - (cell % columns)]);
    const given = { rows, columns, rowStep: 5 };
    const rising = frequencyWavenumberSpectrum({ ...given, values, columnStep: 20000 }, settings);
    const falling = frequencyWavenumberSpectrum({ ...given, values: turned, columnStep: -20000 }, settings);
    expectAllClose(falling.density, rising.density, rounding);
  });

  test("a wave towards the north-east lies in the first and third quadrants of the plane, also for rows from the north", () => {
    const north = wave(5, -3);
    const fromNorth = north.map(
      (_, cell) => north[(rows - 1 - Math.floor(cell / columns)) * columns + (cell % columns)],
    );
    for (const [values, rowStep] of [
      [north, 20000],
      [fromNorth, -20000],
    ] as const) {
      const plane = planeSpectrum({ values, rows, columns, rowStep, columnStep: 20000 }, settings);
      const at = peak(plane.density);
      const k = plane.zonal[at % columns] * columns * 20000;
      const l = plane.meridional[Math.floor(at / columns)] * rows * 20000;
      expectClose(Math.abs(k), 5, rounding, "zonal");
      expectClose(l / k, 3 / 5, rounding, "direction");
    }
  });

  test("too little of a plane, or no whole row, gives no density rather than a wrong one", () => {
    const values = noise(rows * columns, 2).map((value, i) => (i % columns === 4 ? Number.NaN : value));
    const strict = { ...settings, leastShare: 0.99 };
    const plane = planeSpectrum({ values, rows, columns, rowStep: 1, columnStep: 1 }, strict);
    expect(plane.density.every(Number.isNaN)).toBe(true);
    const lines = zonalSpectrum(values, { columns, spacingMetres: new Float64Array(rows).fill(1) }, strict);
    expect(lines.lines).toBe(0);
    expect(lines.density.every(Number.isNaN)).toBe(true);
    const bridged = planeSpectrum(
      { values, rows, columns, rowStep: 1, columnStep: 1 },
      { ...strict, bridgedCells: 1, detrend: "linear" },
    );
    expect(bridged.share).toBe(1);
    expect(bridged.density.some(Number.isNaN)).toBe(false);
  });
});
