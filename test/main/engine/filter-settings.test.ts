import { execFileSync } from "node:child_process";
import { join } from "node:path";
import { fileURLToPath } from "node:url";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import type { OpenStudy } from "../../../core/contract/engine";
import { createEngine } from "../../../main/engine/engine";
import { expectAllClose, expectClose } from "../../expect-close";
import { line, studyOf, writeMadeGrid } from "../../properties/made-grid";
import { readBack, readRun } from "../../properties/read-back";
import { python } from "../../setup/python";
import { temporaryFolder } from "../../temporary-folder";

const temporary = temporaryFolder();
const engine = createEngine({ workers: 2 });
afterAll(() => engine.close());

const degree = Math.PI / 180;
const radiusKm = 6371;
const float32 = { relative: 2e-7, because: "fields.nc holds float32" };
let runs = 0;

async function run(open: OpenStudy) {
  const folder = join(temporary, `run-${++runs}`);
  await engine.run({ open, folder, overwrite: false });
  const fields = (names: readonly string[]) => readBack(join(folder, "fields.nc"), names);
  return { folder, fields, ...readRun(folder) };
}

const view = (open: OpenStudy, quantity: string, inBand: boolean, dateIndex: number) =>
  engine.latitudes({ open, grid: "A", choice: { quantity, inBand }, dateIndex, columns: 1000 });

/** Restless heights that no filter treats specially, different in every cell. */
const restless = (day: number, latitude: number, longitude: number) =>
  0.6 +
  0.1 * Math.sin(day / 9 + latitude) +
  0.07 * Math.cos(day / 23 - longitude) +
  0.01 * (Math.abs(Math.round(day * 37 + latitude * 101 + longitude * 53)) % 17);

const patch = { latitudes: line(30, 0.5, 4), longitudes: line(-150, 0.5, 5) };

describe("filters along time, against numpy and scipy on the same file", () => {
  const path = join(temporary, "heights.nc");
  // Two dates missing: a gap of 9 days, bridged.
  const days = line(20000, 3, 170).filter((_, t) => t !== 60 && t !== 61);
  beforeAll(async () => {
    await writeMadeGrid(path, { ...patch, days, height: restless });
  });

  test.each([
    ["butterworth", 30, 150, 3, "half-amplitude", "a Butterworth filter of order 3", "eriods of 30 to 150 days"],
    ["butterworth", 40, null, 4, "half-amplitude", "a Butterworth filter of order 4", "eriods over 40 days"],
    ["butterworth", 40, null, 2, "half-power", "a Butterworth filter of order 2", "eriods over 40 days"],
    ["butterworth", null, 90, 2, "half-power", "a Butterworth filter of order 2", "eriods under 90 days"],
    ["running-mean", 30, 120, 4, "half-amplitude", "running means", "eriods of 30 to 120 days"],
    ["running-mean", 33, null, 4, "half-amplitude", "running means", "eriods over 33 days"],
    ["lanczos", 30, null, 4, "half-amplitude", "a Lanczos filter", "eriods over 30 days"],
    ["lanczos", null, 90, 4, "half-amplitude", "a Lanczos filter", "eriods under 90 days"],
  ] as const)(
    "%s from %s to %s days, order %i, %s",
    async (filter, shortestDays, longestDays, order, cut, ...words) => {
      const band = { filter, shortestDays, longestDays, order, cut, bridgeDays: 15 };
      const background = { mean: true, trend: true, annual: false, semiannual: false };
      const open = studyOf([path], { band, background });
      const { folder, summary, methods, history } = await run(open);
      const script = fileURLToPath(new URL("../../properties/time_filters.py", import.meta.url));
      const arguments_ = ["-W", "ignore", script, path, join(folder, "fields.nc"), JSON.stringify(band)];
      const report = JSON.parse(execFileSync(python, arguments_).toString());
      expect(report.onlyOne).toBe(0);
      expect(report.compared).toBeGreaterThan(2000);
      // float32 of the result, against a wave of several times the rms.
      expect(report.largest).toBeLessThan(1e-6);
      expect(summary.study.band).toEqual({ ...open.study.band });
      expect(summary.filter.bridgedDates).toBe(2);
      const told = readBack(join(folder, "latitude-time.nc"), ["coverage", "filter_end", "bridged"]);
      expect(Array.from(told.bridged.keys()).filter((t) => told.bridged[t] === 1)).toEqual([60, 61]);
      expect(told.coverage[59] + told.coverage[60]).toBe(1);
      expect([told.filter_end[0], told.filter_end[110], told.filter_end[169]]).toEqual([1, 0, 1]);
      expect(told.filter_end.reduce((sum, mark) => sum + mark, 0)).toBe(summary.filter.markedDates);
      expect(methods.includes("odd extension at the ends")).toBe(filter === "butterworth");
      expect(history).toContain(JSON.stringify(open.study.band));
      for (const part of [...words, "up to 15 days"]) expect(methods).toContain(part);
    },
  );
});

describe("bridgeDays 0", () => {
  const gap = (t: number) => t >= 100 && t < 105;
  const days = line(20000, 3, 230).filter((_, t) => !gap(t));
  const path = join(temporary, "gap.nc");
  beforeAll(async () => {
    await writeMadeGrid(path, { ...patch, days, height: restless });
  });

  test.each([
    ["lanczos", {}],
    ["butterworth", { order: 2 }],
    ["running-mean", {}],
  ])("splits the record at its gap: %s gives what the two parts give alone", async (filter, more) => {
    const band = { filter, shortestDays: 18, longestDays: 90, bridgeDays: 0, ...more };
    const whole = await run(studyOf([path], { band }));
    const first = await run(studyOf([path], { band, period: { from: "2024-10-04", to: "2025-07-30" } }));
    const second = await run(studyOf([path], { band, period: { from: "2025-08-15", to: "2026-12-31" } }));
    const names = ["height_band", "u_band", "vorticity_band"];
    const [all, before, after] = [whole, first, second].map(({ fields }) => fields(names));
    const cells = 20;
    for (const name of names) {
      const parts = [...before[name], ...new Float64Array(5 * cells).fill(Number.NaN), ...after[name]];
      expect(all[name].length).toBe(230 * cells);
      expectAllClose(all[name], parts, { ...float32, because: "the same weights and heights" }, name);
    }
    expect(whole.summary.filter.bridgedDates).toBe(0);
    const bridged = await run(studyOf([path], { band: { ...band, bridgeDays: 15 } }));
    expect(bridged.summary.filter.bridgedDates).toBe(5);
    const other = bridged.fields(["height_band"]).height_band;
    const near = 94 * cells;
    expect(Math.abs(other[near] - all.height_band[near])).toBeGreaterThan(1e-4);
    for (let t = 100; t < 105; t++) expect(other[t * cells]).toBeNaN();
  });
});

describe("spectra", () => {
  test.each([
    ["hann", 0.5, "Hann"],
    ["hamming", 0.25, "Hamming"],
    ["boxcar", 0, ""],
    ["cosine", 0.5, "cosine"],
    ["multitaper", 0, "sine"],
  ] as const)(
    "with %s tapers hold the variance of a 5 cm wave, and tell taper, overlap and units",
    async (taper, overlap, name) => {
      const days = line(20000, 3, 200);
      const height = (day: number) => 0.05 * Math.cos((2 * Math.PI * (day - 20000)) / 60);
      const path = await writeMadeGrid(join(temporary, `${taper}.nc`), { ...patch, days, height });
      const open = studyOf([path], { spectrum: { taper, overlap } });
      const { density, frequency, window, units } = await engine.spectrum({ open, grid: "A", quantity: "height" });
      const variance = density.reduce((sum, value) => sum + value, 0) * (frequency[1] - frequency[0]);
      expectClose(variance, 0.05 ** 2 / 2, { relative: 0.01, because: "ten whole waves under a taper of unit power" });
      expectClose(1 / frequency[density.indexOf(Math.max(...density))], 60, {
        relative: 0.11,
        because: "one frequency step",
      });
      expect(window).toMatch(new RegExp(`${name}.*overlap ${100 * overlap} %`, "i"));
      expect(units).toBe("(m)2 day");
    },
  );
});

describe("filters in space", () => {
  const latitudes = line(28, 0.25, 41);
  const longitudes = line(-150, 0.25, 81);
  const middle = 33;
  const zonalKm = (degrees: number) => degrees * degree * radiusKm * Math.cos(middle * degree);
  const shortWave = (x: number) => 0.05 * Math.sin((2 * Math.PI * (x + 150)) / 2);
  const shortNorth = (y: number) => 0.04 * Math.cos((2 * Math.PI * y) / 1.8);
  const path = join(temporary, "waves.nc");
  const height = (day: number, y: number, x: number) => {
    const large = 0.5 + 0.02 * (y - middle) + 0.004 * (x + 140) ** 2 + 0.003 * (y - middle) ** 2;
    return large + (1 + 0.1 * Math.cos(day)) * (shortWave(x) + shortNorth(y));
  };
  beforeAll(async () => {
    await writeMadeGrid(path, { latitudes, longitudes, days: line(20000, 3, 3), height });
  });
  /** Rows and columns farther than a quarter of the box from its edges. */
  const inner = latitudes.flatMap((y, row) =>
    longitudes.flatMap((x, column) =>
      Math.abs(y - middle) < 2 && Math.abs(x + 140) < 4 ? [[row, column] as const] : [],
    ),
  );
  const cellOf = (row: number, column: number) => row * longitudes.length + column;

  async function filtered(space: object) {
    const open = studyOf([path], { space });
    const made = await run(open);
    expect(made.summary.study.space).toEqual({ ...open.study.space });
    expect(made.history).toContain(JSON.stringify(open.study.space));
    const { height: values, u, v } = made.fields(["height", "u", "v"]);
    return { ...made, values, u, v };
  }
  const plain = () => run(studyOf([path])).then(({ fields }) => fields(["height", "u", "v"]));
  const amplitude = 1 + 0.1 * Math.cos(20000);

  test("a zonal band keeps the zonal wave inside it and takes off what is longer or constant along parallels", async () => {
    const { values, methods } = await filtered({ zonal: { shortestKm: null, longestKm: 2 * zonalKm(2) } });
    for (const [row, column] of inner) {
      expectClose(values[cellOf(row, column)], amplitude * shortWave(longitudes[column]), {
        absolute: 0.004,
        because: "the Lanczos response an octave above its cut, and curvature of the slow part under the kernel",
      });
    }
    expect(methods).toMatch(/zonal wavelengths under \d+(\.\d+)? km were kept/);
    expect(methods).toContain("Duchon, C. E. (1979)");
  });

  test("a meridional band keeps the wave along meridians and takes off what is constant along them", async () => {
    const { values, methods } = await filtered({ meridional: { shortestKm: null, longestKm: 400 } });
    for (const [row, column] of inner) {
      expectClose(values[cellOf(row, column)], amplitude * shortNorth(latitudes[row]), {
        absolute: 0.004,
        because: "the Lanczos response an octave above its cut, and curvature of the slow part under the kernel",
      });
    }
    expect(methods).toContain("meridional wavelengths under 400 km were kept");
  });

  test("a row's zonal mean is taken off height and so off u, and v stays", async () => {
    const { values, u, v } = await filtered({ removeZonalMean: true });
    const before = await plain();
    for (let row = 0; row < latitudes.length; row++) {
      const mean = (plane: Float64Array) =>
        plane.subarray(cellOf(row, 0), cellOf(row + 1, 0)).reduce((sum, value) => sum + value, 0) / longitudes.length;
      expectClose(mean(values), 0, { absolute: 1e-7, because: "float32 heights of tenths of a metre" });
      expectClose(mean(u), 0, { absolute: 1e-6, because: "float32 velocities of a metre a second" });
    }
    const plane = latitudes.length * longitudes.length;
    expectAllClose(v.subarray(0, plane), before.v.subarray(0, plane), { absolute: 1e-6, because: "float32 results" });
  });

  test("a loess surface takes off the quadratic large scale and leaves the waves", async () => {
    const { values, methods, summary } = await filtered({ removeSurface: { zonalKm: 800, meridionalKm: 500 } });
    for (const [row, column] of inner) {
      const waves = amplitude * (shortWave(longitudes[column]) + shortNorth(latitudes[row]));
      expectClose(values[cellOf(row, column)], waves, {
        absolute: 0.01,
        because: "a tricube fit over eight and five wavelengths still holds a few per cent of them",
      });
    }
    expect(methods).toContain(
      "loess surface (Cleveland and Devlin 1988) of half-spans 800 km (zonal) and 500 km (meridional)",
    );
    expect(methods).toContain("Cleveland, W. S., and Devlin, S. J. (1988)");
    expect(summary.cautions.map(({ id }: { id: string }) => id)).toContain("space");
  });

  test("every filter in space acts on the picture and the map alike", async () => {
    const open = studyOf([path], { space: { removeZonalMean: true, meridional: { shortestKm: 80, longestKm: 400 } } });
    const { onDate, latitudeTime } = await view(open, "u", false, 1);
    const column = onDate.map((_, row) => latitudeTime.values[row * 3 + 1]);
    expectAllClose(column, onDate, { absolute: 1e-7, because: "float32 of the picture" });
    // Without its zonal mean a height has no zonal mean of u; a filter along meridians keeps that.
    for (const value of onDate) expectClose(value, 0, { absolute: 1e-12, because: "sums of 81 cells" });
  });

  test("a wavelength the grid cannot hold is refused with one line", async () => {
    const refused = run(studyOf([path], { space: { zonal: { shortestKm: 20, longestKm: 400 } } }));
    await expect(refused).rejects.toThrow(/^space: .*at least two cells/);
  });
});
