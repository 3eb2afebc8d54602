import { readFileSync } from "node:fs";
import { join } from "node:path";
import fc from "fast-check";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { makeAxis } from "../../core/model/axis";
import { createEngine } from "../../main/engine/engine";
import { selectRegion } from "../../main/readers/select";
import { expectAllClose } from "../expect-close";
import { temporaryFolder } from "../temporary-folder";
import { line, type MadeGrid, studyOf, writeMadeGrid } from "./made-grid";
import { readBack } from "./read-back";

const temporary = temporaryFolder();
const engine = createEngine({ workers: 2 });
afterAll(() => engine.close());
let runs = 0;

const names = ["height", "u", "v", "vorticity", "height_band", "u_band", "v_band", "vorticity_band"];
const band = { filter: "lanczos", shortestDays: 18, longestDays: 60 };

async function run(path: string, changes: object = {}) {
  const folder = join(temporary, `run-${++runs}`);
  await engine.run({ open: studyOf([path], { band, ...changes }), folder, overwrite: false });
  return { folder, fields: readBack(join(folder, "fields.nc"), [...names, "latitude", "longitude"]) };
}

const degree = Math.PI / 180;
/** Smooth round the globe, with land about 3° E. */
const height = (day: number, y: number, longitude: number) => {
  const x = ((longitude % 360) + 360) % 360;
  if (Math.abs(x - 3) < 1.6 && y > 32) return Number.NaN;
  return 0.4 + 0.1 * Math.sin(3 * x * degree + day / 7) + 0.05 * Math.cos(17 * x * degree - y / 2 + day / 11);
};
const days = line(20000, 3, 40);
const globe: MadeGrid = { latitudes: line(28, 1, 8), longitudes: line(0, 2, 180), days, height };
const box: MadeGrid = { latitudes: line(28, 0.5, 12), longitudes: line(-6, 0.5, 24), days, height };

describe("longitudes told from 0 or from -180", () => {
  const stored = [0, -180, 100, -359.5].map((west) => line(west, 0.5, 720));
  const axesOf = (longitudes: number[]) => ({
    latitude: makeAxis("latitude", line(20, 1, 5), "test"),
    longitude: makeAxis("longitude", longitudes, "test"),
  });

  test("the same region holds the same cells in the same order, wherever a file's seam is", () => {
    const draws = fc.record({
      west: fc.integer({ min: -360, max: 360 }),
      width: fc.integer({ min: 1, max: 360 }),
      turn: fc.constantFrom(-360, 0, 360),
    });
    fc.assert(
      fc.property(draws, ({ west, width, turn }) => {
        const region = { west: west / 2, east: west / 2 + width, south: 20, north: 24 };
        const asked = [region, { ...region, west: region.west + turn, east: region.east + turn }];
        const chosen = stored.flatMap((longitudes) =>
          asked.map((each) => {
            const { axes, longitude } = selectRegion(axesOf(longitudes), each, "test");
            const read = longitude.flatMap(([from, to]) => longitudes.slice(from, to));
            const around = (value: number) => ((value % 360) + 360) % 360;
            expect(read.map(around)).toEqual(Array.from(axes.longitude.values, around));
            const { values } = axes.longitude;
            expect(values.every((value, i) => i === 0 || value - values[i - 1] === 0.5)).toBe(true);
            return read.map(around);
          }),
        );
        for (const cells of chosen) expect(cells).toEqual(chosen[0]);
        expect(chosen[0].length).toBe(Math.min(720, 2 * width + 1));
      }),
      { numRuns: 100 },
    );
  });

  test("350 to 10 of a global file is one box, with the same values whichever way the file counts", async () => {
    const east = await writeMadeGrid(join(temporary, "east.nc"), globe);
    const west = await writeMadeGrid(join(temporary, "west.nc"), { ...globe, longitudes: line(-180, 2, 180) });
    const region = { west: 350, east: 10, south: 28, north: 35 };
    const [one, other] = [await run(east, { region }), await run(west, { region })];
    expect(Array.from(one.fields.longitude)).toEqual(line(350, 2, 11));
    expect(other.fields).toEqual(one.fields);
    const wanted = days.flatMap((day) =>
      globe.latitudes.flatMap((y) => line(350, 2, 11).map((x) => height(day, y, x))),
    );
    expectAllClose(one.fields.height, wanted, { relative: 1e-7, because: "float32" });
  });

  test("on a whole turn derivatives cross the seam: what the file calls first changes nothing", async () => {
    const region = { west: 0, east: 360, south: 28, north: 35 };
    const results: Record<string, Float64Array>[] = [];
    for (const start of [0, -180, 76]) {
      const path = await writeMadeGrid(join(temporary, `turn-${start}.nc`), {
        ...globe,
        longitudes: line(start, 2, 180),
      });
      results.push((await run(path, { region })).fields);
    }
    expect(results[1]).toEqual(results[0]);
    expect(results[2]).toEqual(results[0]);
    for (const name of ["u", "v", "vorticity"]) {
      const isSame = results[0][name].every((value, i) => Number.isNaN(value) === Number.isNaN(results[0].height[i]));
      expect(isSame, `${name}: a blank where there is a height`).toBe(true);
    }
  });
});

describe("one box of heights", () => {
  let path = "";
  beforeAll(async () => {
    path = await writeMadeGrid(join(temporary, "box.nc"), box);
  });
  const bytesOf = (folder: string, name: string) => readFileSync(join(folder, name)).toString("base64");

  test("written from north to south gives the same files as from south to north", async () => {
    const turned = await writeMadeGrid(join(temporary, "turned.nc"), { ...box, latitudes: box.latitudes.toReversed() });
    const [up, down] = [await run(path), await run(turned)];
    for (const name of ["fields.nc", "latitude-time.nc", "profile.csv"]) {
      expect(bytesOf(down.folder, name) === bytesOf(up.folder, name), name).toBe(true);
    }
    const region = { west: -4, east: 3, south: 29, north: 32 };
    const [part, turnedPart] = [await run(path, { region }), await run(turned, { region })];
    expect(turnedPart.fields).toEqual(part.fields);
  });

  test("a constant added to every height changes no velocity, and no band that has its mean taken off", async () => {
    const background = { mean: true, trend: false, annual: false, semiannual: false };
    const plain = await run(path, { background });
    for (const constant of [-1.5, 40]) {
      const lifted = { ...box, height: (day: number, y: number, x: number) => constant + height(day, y, x) };
      const { fields } = await run(await writeMadeGrid(join(temporary, `lifted${constant}.nc`), lifted), {
        background,
      });
      for (const name of names.filter((each) => each !== "height")) {
        // float64 heights of 40 m carry 7e-15 m of rounding; differenced that stays under 1e-9 of the field.
        expectAllClose(fields[name], plain.fields[name], { relative: 1e-6, because: "float32 results" }, name);
      }
    }
  });

  test.each([
    ["cm", 100],
    ["mm", 1000],
    ["km", 0.001],
  ])("told in %s it gives the same fields in SI units", async (units, perMetre) => {
    const scaled = { ...box, units, height: (day: number, y: number, x: number) => perMetre * height(day, y, x) };
    const [plain, other] = [await run(path), await run(await writeMadeGrid(join(temporary, `in-${units}.nc`), scaled))];
    for (const name of names) {
      expectAllClose(other.fields[name], plain.fields[name], { relative: 1e-6, because: "float32 results" }, name);
    }
  });

  test("packed as whole tenths of a millimetre it gives the same fields in m, cm and mm, and heights to half a step", async () => {
    const results = [];
    for (const [units, scale] of [
      ["m", 1e-4],
      ["cm", 1e-2],
      ["mm", 1e-1],
    ] as const) {
      const packed: MadeGrid = {
        ...box,
        type: "int16",
        units,
        attributes: { scale_factor: scale, add_offset: 0, missing_value: -32767 },
        height: (day, y, x) => {
          const metres = height(day, y, x);
          return Number.isNaN(metres) ? -32767 : Math.round(metres / 1e-4);
        },
      };
      results.push((await run(await writeMadeGrid(join(temporary, `packed-${units}.nc`), packed))).fields);
    }
    const plain = (await run(path)).fields;
    expectAllClose(results[0].height, plain.height, {
      absolute: 5.001e-5,
      because: "half a step of 0.1 mm, and float32",
    });
    for (const other of results.slice(1)) {
      for (const name of names) {
        expectAllClose(other[name], results[0][name], { relative: 1e-6, because: "float32 results" }, name);
      }
    }
  });
});
