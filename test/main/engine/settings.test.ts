import { join } from "node:path";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import type { OpenStudy } from "../../../core/contract/engine";
import { quantities } from "../../../core/ocean/quantities/index";
import { createEngine } from "../../../main/engine/engine";
import { expectAllClose, expectClose } from "../../expect-close";
import { line, studyOf, writeMadeGrid } from "../../properties/made-grid";
import { readBack, readRun } from "../../properties/read-back";
import { temporaryFolder } from "../../temporary-folder";

const temporary = temporaryFolder();
const engine = createEngine({ workers: 2 });
afterAll(() => engine.close());

const degree = Math.PI / 180;
const R = 6371000;
const omega = 7.292115e-5;
let runs = 0;

async function run(open: OpenStudy) {
  const folder = join(temporary, `run-${++runs}`);
  await engine.run({ open, folder, overwrite: false });
  return {
    fields: (names: readonly string[]) => readBack(join(folder, "fields.nc"), names),
    ...readRun(folder),
  };
}

const view = (open: OpenStudy, quantity: string, inBand = false, dateIndex = 0) =>
  engine.latitudes({ open, grid: "A", choice: { quantity, inBand }, dateIndex, columns: 1000 });

describe("the equator: a Kelvin wave of 5 cm and 2.7 m/s on a sphere", () => {
  const [g, c] = [9.7803, 2.7];
  const beta = (2 * omega) / R;
  const latitudes = line(-8, 0.25, 65);
  const longitudes = line(-140, 0.25, 9);
  const kelvin = (latitude: number) => 0.05 * Math.exp((-beta * (latitude * degree * R) ** 2) / (2 * c));
  const path = join(temporary, "kelvin.nc");
  const sphere = { earth: "sphere", gravity: g };
  const geostrophy = (more: object) => studyOf([path], { geostrophy: { ...sphere, ...more } });
  beforeAll(async () => {
    await writeMadeGrid(path, { latitudes, longitudes, days: line(20000, 3, 2), height: (_, y) => kelvin(y) });
  });
  const uAt = (u: ArrayLike<number>, row: number) => u[row * longitudes.length + 4];

  test('"blank" leaves the belt empty and says so', async () => {
    const { fields, summary, methods } = await run(geostrophy({ equator: "blank", equatorDegrees: 5 }));
    const { u } = fields(["u"]);
    for (const [row, latitude] of latitudes.entries()) {
      expect(Number.isNaN(uAt(u, row)), `${latitude}°`).toBe(Math.abs(latitude) < 5);
    }
    const caution = summary.cautions.find(({ id }: { id: string }) => id === "equator");
    expect(caution.text).toMatch(/^39 rows within 5° of the equator are blank/);
    expect(methods).toContain("Rows within 5° of the equator are blank");
    expect((await engine.load({ open: geostrophy({}), grid: "A" })).blendedRows).not.toContain(1);
  });

  test('"blend" gives g/c times the height within 15 % all over the belt, marks its rows and says so', async () => {
    const open = geostrophy({ equator: "blend" });
    const { fields, summary, methods, history } = await run(open);
    const { u, v } = fields(["u", "v"]);
    for (const [row, latitude] of latitudes.entries()) {
      if (Math.abs(latitude) > 5) continue;
      const truth = (g / c) * kelvin(latitude);
      expectClose(
        uAt(u, row),
        truth,
        { relative: 0.15, because: "what a cubic over ten degrees can follow" },
        `${latitude}°`,
      );
      expectClose(uAt(v, row), 0, { absolute: 1e-9, because: "the height does not change eastward" });
    }
    const { blendedRows } = await engine.load({ open, grid: "A" });
    // exp[-(4.72/2.2)²] = 0.01: quarter degrees up to 4.5 are marked.
    expect(Array.from(blendedRows)).toEqual(latitudes.map((y) => (Math.abs(y) <= 4.6 ? 1 : 0)));
    expect(summary.study.geostrophy).toMatchObject({ equator: "blend", blendScaleDegrees: 2.2, blendWidthDegrees: 5 });
    expect(history).toContain('"equator":"blend"');
    expect(methods).toContain("beta-plane solution (Lagerloef et al. 1999): weight exp[−(φ/2.2°)²]");
    expect(methods).toContain("J. Geophys. Res. 104, 23313");
  });

  test("the blend's scale and width act: a narrower one leaves more of the belt to f", async () => {
    const wide = await view(geostrophy({ equator: "blend" }), "u");
    const narrow = await view(geostrophy({ equator: "blend", blendScaleDegrees: 1, blendWidthDegrees: 3 }), "u");
    const truth = (row: number) => (g / c) * kelvin(latitudes[row]);
    const off = (result: typeof wide, row: number) => Math.abs(uAt(result.map.values, row) / truth(row) - 1);
    expect(off(narrow, 32)).toBeLessThan(0.5 * off(wide, 32));
    const { blendedRows } = await engine.load({
      open: geostrophy({ equator: "blend", blendScaleDegrees: 1, blendWidthDegrees: 3 }),
      grid: "A",
    });
    // exp[-(2.146/1)²] = 0.01.
    expect(Array.from(blendedRows)).toEqual(latitudes.map((y) => (Math.abs(y) < 2.1 ? 1 : 0)));
  });
});

describe("quantities of a Gaussian eddy at 40° N (0.3 m, 50 km)", () => {
  const [A, L] = [0.3, 50];
  const latitudes = line(38, 0.1, 41);
  const longitudes = line(-152, 0.1, 41);
  const metres = (y: number, x: number) => [(x + 150) * degree * R * Math.cos(y * degree), (y - 40) * degree * R];
  const path = join(temporary, "eddy.nc");
  beforeAll(async () => {
    const height = (_: number, y: number, x: number) =>
      A * Math.exp(-((metres(y, x)[0] / 1000) ** 2 + (metres(y, x)[1] / 1000) ** 2) / (2 * L * L));
    await writeMadeGrid(path, { latitudes, longitudes, days: line(20000, 3, 3), height });
  });
  const open = () => studyOf([path], { geostrophy: { earth: "sphere", gravity: 9.81, stencil: 9 } });

  test("the cyclogeostrophic speed solves V²/r + fV = f Vg, the geostrophic one does not", async () => {
    const f = 2 * omega * Math.sin(40 * degree);
    const [speed, plain, north] = await Promise.all(
      ["speed-cyclogeostrophic", "speed", "v-cyclogeostrophic"].map((id) => view(open(), id)),
    );
    const row = 20;
    for (const column of [24, 26, 28]) {
      const [x, y] = metres(40, longitudes[column]);
      const r = Math.hypot(x, y);
      const geostrophic = (-9.81 * A * (r / (L * 1000) ** 2) * Math.exp(-(r * r) / (2 * (L * 1000) ** 2))) / f;
      const balanced = (-f * r) / 2 + Math.sqrt((f * r) ** 2 / 4 + f * r * geostrophic);
      const cell = row * longitudes.length + column;
      const because =
        "f, and so the eddy's shape, changes across it by two per cent a radius; curvature from differences";
      expectClose(plain.map.values[cell], Math.abs(geostrophic), { relative: 0.005, because }, "geostrophic");
      expectClose(speed.map.values[cell], Math.abs(balanced), { relative: 0.02, because }, "cyclogeostrophic");
      expectClose(north.map.values[cell], balanced, { relative: 0.02, because }, "northward");
      expect(Math.abs(balanced / geostrophic) - 1).toBeGreaterThan(0.05);
    }
  });

  test.each(quantities.map(({ id }) => id))("%s has a map, a picture and finite limits in order", async (id) => {
    const { map, latitudeTime, limits, pictureLimits } = await view(open(), id);
    for (const plane of [map, latitudeTime]) {
      expect(plane.values.filter(Number.isFinite).length / plane.values.length).toBeGreaterThan(0.9);
    }
    for (const [low, high] of [limits, pictureLimits]) {
      expect(Number.isFinite(low) && Number.isFinite(high) && low < high).toBe(true);
    }
  });
});

describe("the height's error", () => {
  const latitudes = line(30, 0.25, 9);
  const longitudes = line(-150, 0.25, 11);
  const errorAt = (day: number, y: number) => (0.02 + 0.002 * (y - 30)) * (day === 20000 ? 1 : 2);
  const [path, bare] = [join(temporary, "with-error.nc"), join(temporary, "bare.nc")];
  const days = line(20000, 3, 40);
  const height = (day: number, y: number, x: number) => 0.5 + 0.1 * Math.sin(day / 8 + y + x / 2);
  beforeAll(async () => {
    const attributes = { standard_name: "sea_surface_height_above_geoid standard_error", units: "m" };
    const beside = [{ name: "adt_error", attributes, value: errorAt }];
    await writeMadeGrid(path, { latitudes, longitudes, days, height, beside });
    await writeMadeGrid(bare, { latitudes, longitudes, days, height });
  });
  const names = ["height_error", "u_error", "v_error", "vorticity_error"];
  const simple = { stencil: 3, earth: "sphere", gravity: 9.81 };
  const f = (y: number) => 2 * omega * Math.sin(y * degree);

  test("a number becomes g sigma √2 / (2 f dy) of u for independent cells and three points, in file and view alike", async () => {
    const open = studyOf([bare], { geostrophy: simple, errors: { heightMetres: 0.02 } });
    const { fields, summary, methods, history } = await run(open);
    const got = fields(names);
    for (let row = 1; row < latitudes.length - 1; row++) {
      const cell = row * longitudes.length + 5;
      const exact = { relative: 1e-6, because: "float32 of the file" };
      const y = latitudes[row];
      const perMetre = (9.81 * 0.02 * Math.SQRT2) / (2 * f(y) * 0.25 * degree * R);
      expectClose(got.height_error[cell], 0.02, exact);
      expectClose(got.u_error[cell], perMetre, exact, `u at ${y}`);
      expectClose(got.v_error[cell], perMetre / Math.cos(y * degree), exact, `v at ${y}`);
    }
    for (const id of ["height", "u", "v", "vorticity"]) {
      const { error } = await view(open, id);
      expectAllClose(error?.map.values ?? [], got[`${id}_error`], { absolute: 0, because: "one plane" }, id);
    }
    expect(summary.errors.height.unit).toBe("m");
    expectClose(summary.errors.height.value, 0.02, { relative: 1e-12, because: "a mean over cells" });
    expect(summary.errors.u.value).toBeGreaterThan(0);
    expect(methods).toContain("a height error of 0.02 m, independent between cells");
    expect(history).toContain('"heightMetres":0.02');
  });

  test("alike errors nearby make a smaller error of slope", async () => {
    const far = await view(studyOf([bare], { errors: { heightMetres: 0.02, correlationKm: 100 } }), "u");
    const alone = await view(studyOf([bare], { errors: { heightMetres: 0.02 } }), "u");
    const cell = 4 * longitudes.length + 5;
    expect(far.error?.map.values[cell]).toBeLessThan(0.5 * (alone.error?.map.values[cell] ?? 0));
    expect(far.error?.onDate[4]).toBeGreaterThan(0);
  });

  test("in the band it is scaled by the root of the weights' squares, and there is none where there is no map", async () => {
    const gappy = join(temporary, "error-gap.nc");
    const dates = line(20000, 3, 300).filter((_, t) => t !== 100);
    await writeMadeGrid(gappy, { latitudes, longitudes, days: dates, height });
    const band = { filter: "lanczos", shortestDays: 30, longestDays: 120 };
    const open = studyOf([gappy], { band, errors: { heightMetres: 0.02 } });
    const [raw, banded, missing] = [
      await view(open, "u", false, 200),
      await view(open, "u", true, 200),
      await view(open, "u", true, 100),
    ];
    // Parseval: the sum of the weights' squares is the integral of the squared response over all frequencies.
    const { frequency, amplitude } = banded.response;
    let squares = 0;
    for (let i = 1; i < frequency.length; i++) {
      squares += (2 * 3 * (amplitude[i] ** 2 + amplitude[i - 1] ** 2) * (frequency[i] - frequency[i - 1])) / 2;
    }
    const cell = 4 * longitudes.length + 5;
    const share = (banded.error?.map.values[cell] ?? 0) / (raw.error?.map.values[cell] ?? 1);
    expectClose(share, Math.sqrt(squares), { relative: 0.01, because: "the trapezoid rule on 400 frequencies" });
    expect(missing.map.values.some(Number.isFinite)).toBe(false);
    expect(missing.error?.map.values.some(Number.isFinite)).toBe(false);
  });

  test('"file" is the root mean square over time of the files\' own error variable', async () => {
    const open = studyOf([path], { geostrophy: simple, errors: { heightMetres: "file" } });
    const { fields, summary, methods } = await run(open);
    const got = fields(names);
    for (const [row, y] of latitudes.entries()) {
      const rms = Math.sqrt(days.reduce((sum, day) => sum + errorAt(day, y) ** 2, 0) / days.length);
      expectClose(got.height_error[row * longitudes.length + 3], rms, {
        relative: 1e-6,
        because: "float32 of the file",
      });
    }
    const [south, north] = [2, 4].map((row) => got.height_error[row * longitudes.length + 5]);
    const u = got.u_error[3 * longitudes.length + 5];
    const wanted = (9.81 * Math.hypot(south, north)) / (2 * f(latitudes[3]) * 0.25 * degree * R);
    expectClose(u, wanted, { relative: 1e-6, because: "float32 of the file" });
    for (const id of ["height", "u", "v", "vorticity"]) {
      const { error } = await view(open, id);
      expectAllClose(error?.map.values ?? [], got[`${id}_error`], { absolute: 0, because: "one plane" }, id);
    }
    expect(methods).toContain("the files' own error");
    expect(summary.study.errors.heightMetres).toBe("file");
  });

  test('"file" asked of files without an error variable is refused with one line', async () => {
    const refused = run(studyOf([bare], { errors: { heightMetres: "file" } }));
    await expect(refused).rejects.toThrow(
      /^errors\.heightMetres: expected an error variable beside adt in the files, got none; give the height's standard error in metres instead$/,
    );
  });

  test("without an error asked for, file and view have none", async () => {
    const open = studyOf([path]);
    const { summary } = await run(open);
    expect(summary.errors).toBeNull();
    expect((await view(open, "u")).error).toBeNull();
  });
});

describe("velocities that the files supply", () => {
  const latitudes = line(30, 0.25, 17);
  const longitudes = line(-150, 0.25, 19);
  const eta = (day: number, y: number, x: number) => 0.3 * Math.sin(1.7 * x + day / 20) * Math.cos(1.3 * y);
  // Three points on a sphere of 6371 km with 9.81 m s-2: centred differences written out.
  const slope = (plus: number, minus: number, metres: number) => (plus - minus) / (2 * metres);
  const perF = (y: number) => 9.81 / (2 * omega * Math.sin(y * degree));
  const u = (day: number, y: number, x: number) =>
    -perF(y) * slope(eta(day, y + 0.25, x), eta(day, y - 0.25, x), 0.25 * degree * R);
  const v = (day: number, y: number, x: number) =>
    perF(y) * slope(eta(day, y, x + 0.25), eta(day, y, x - 0.25), 0.25 * degree * R * Math.cos(y * degree));
  const path = join(temporary, "supplied.nc");

  test("made by three points on a sphere with 9.81 they are recognised as that, to 1e-4 m/s", async () => {
    const named = (direction: string) => ({
      standard_name: `surface_geostrophic_${direction}_sea_water_velocity`,
      units: "m/s",
    });
    await writeMadeGrid(path, {
      latitudes,
      longitudes,
      days: line(20000, 3, 8),
      height: eta,
      beside: [
        { name: "ugos", attributes: named("eastward"), value: u },
        { name: "vgos", attributes: named("northward"), value: v },
      ],
    });
    const open = studyOf([path]);
    const { summary } = await run(open);
    const { bestConvention, agreement, unit, eastward, northward, matchesHeight } = summary.suppliedVelocity;
    expect({ eastward, northward, unit, matchesHeight }).toEqual({
      eastward: "ugos",
      northward: "vgos",
      unit: "m s-1",
      matchesHeight: true,
    });
    expect(bestConvention.convention).toEqual({ stencil: 3, earth: "sphere", radius: 6371000, gravity: 9.81 });
    expect(bestConvention.rmsDifference).toBeLessThan(1e-4);
    expect(bestConvention.rmsSupplied).toBeGreaterThan(0.1);
    // The study's own convention (seven points, ellipsoid) is measurably another one.
    expect(agreement.u.all.rmsDifference).toBeGreaterThan(1e-3);
    const same = studyOf([path], { geostrophy: { stencil: 3, earth: "sphere", gravity: 9.81 } });
    const report = await engine.velocities({ open: same, grid: "A" });
    // Edges: the supplied ones know heights beyond the box, ours are one-sided there.
    expect(report?.agreement.u.all.rmsDifference).toBeLessThan(agreement.u.all.rmsSupplied);
    expect(report?.conventions[0].convention.stencil).toBe(3);
  });
});
