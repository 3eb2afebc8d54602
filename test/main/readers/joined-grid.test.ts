import { truncateSync, utimesSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { File, ready } from "h5wasm/node";
import { describe, expect, it } from "vitest";
import { Fault } from "../../../core/model/errors";
import type { GridWindow } from "../../../core/model/source";
import type { GridIndex } from "../../../main/readers/joined-grid";
import { indexGrid } from "../../../main/readers/joined-grid";
import { readHeights } from "../../../main/readers/read-heights";
import { selectRegion } from "../../../main/readers/select";
import { cpuMilliseconds } from "../../cpu-time";
import type { GridRecipe } from "./grids";
import { knownHeight, writeGrid } from "./grids";
import { expectedFiles } from "./oracle";
import { faultOf, fixture, temporaryFolder } from "./places";

const folder = temporaryFolder();
let files = 0;
const grid = (recipe: GridRecipe = {}) => writeGrid(join(folder, `${files++}.nc`), recipe);
const index = (paths: readonly string[], height = "auto") => indexGrid(paths, { height, id: "A" });

function all({ time, latitude, longitude }: GridIndex): GridWindow {
  return {
    time: [0, time.values.length],
    latitude: [0, latitude.values.length],
    longitude: [[0, longitude.values.length]],
  };
}

async function planes(joined: GridIndex, window = all(joined)): Promise<Map<number, number[]>> {
  const found = new Map<number, number[]>();
  await readHeights(joined, window, (timeIndex, plane) => found.set(timeIndex, [...plane]));
  return found;
}

/** Height that `knownHeight` gives for a date of the joined axis; test files count days from 1950. */
const truth = (joined: GridIndex, timeIndex: number, latitude: number, longitude: number) =>
  knownHeight(joined.time.values[timeIndex] + 7305, latitude, longitude);

/** A netCDF-4 grid of 300 dates, one compressed chunk a date, written with the library that also reads it. */
async function writeRecord(path: string): Promise<void> {
  await ready;
  const file = new File(path, "w");
  const coordinate = (name: string, units: string, values: Float64Array) => {
    const dataset = file.create_dataset({ name, data: values });
    dataset.create_attribute("units", units);
    dataset.make_scale(name);
  };
  coordinate(
    "time",
    "days since 1950-01-01",
    Float64Array.from({ length: 300 }, (_, i) => 29700 + i),
  );
  coordinate(
    "latitude",
    "degrees_north",
    Float64Array.from({ length: 87 }, (_, i) => 20 + i / 4),
  );
  coordinate(
    "longitude",
    "degrees_east",
    Float64Array.from({ length: 101 }, (_, i) => 210 + i / 4),
  );
  const data = Int16Array.from({ length: 300 * 87 * 101 }, (_, i) => 3000 * Math.sin(i / 37) + 500 * Math.sin(i / 3.3));
  const shape = [300, 87, 101];
  const adt = file.create_dataset({ name: "adt", data, shape, chunks: [1, 87, 101], compression: "gzip" });
  adt.create_attribute("units", "m");
  adt.create_attribute("scale_factor", Float64Array.of(1e-4));
  ["/time", "/latitude", "/longitude"].forEach((scale, i) => {
    adt.attach_scale(i, scale);
  });
  file.close();
}

/** Every cell of every plane is the height of its place and date, within half a packing step. */
function expectTruth(
  joined: GridIndex,
  found: Map<number, number[]>,
  latitudes: ArrayLike<number>,
  longitudes: ArrayLike<number>,
  step: number,
) {
  for (const [timeIndex, plane] of found) {
    Array.from(latitudes).forEach((latitude, row) => {
      Array.from(longitudes).forEach((longitude, column) => {
        const got = plane[row * longitudes.length + column];
        expect(Math.abs(got - truth(joined, timeIndex, latitude, longitude))).toBeLessThanOrEqual(step / 2 + 1e-12);
      });
    });
  }
}

it("files packed in different ways are each unpacked by their own, within half a packing step", async () => {
  const joined = await index([
    grid({ scale: 0.0002, offset: 0, times: [29700, 29701] }),
    grid({ scale: 0.01, offset: -0.7, times: [29702] }),
    grid({ scale: 0.001, offset: 2, times: [29703], heightAttributes: { units: "m" } }),
  ]);
  const found = await planes(joined);
  expect(found.size).toBe(4);
  expectTruth(joined, found, joined.latitude.values, joined.longitude.values, 0.01);
  expect(joined.notes).toContain("the files are packed in 3 ways; each is unpacked by its own");
});

it("a jitter of 1e-6 degrees between files never changes the grid; more is refused with both files, index and values", async () => {
  const first = grid({ longitudes: [210.1, 211.1, 212.1], times: [29700] });
  const jittered = grid({ longitudes: [210.1000009, 211.1, 212.0999992], times: [29701] });
  const joined = await index([first, jittered]);
  expect([...joined.longitude.values]).toEqual([210.1, 211.1, 212.1]);
  const shifted = grid({ longitudes: [210.1, 211.10001, 212.1], times: [29701] });
  const fault = await faultOf(() => index([first, shifted]));
  expect(fault.message).toBe(
    `${shifted}: expected longitude 211.1 at index 1 as in ${first}, got 211.10001; bring the files to one grid, or give them to two grids`,
  );
  const longer = grid({ longitudes: [210.1, 211.1, 212.1, 213.1], times: [29701] });
  expect((await faultOf(() => index([first, longer]))).message).toMatch(/expected 3 longitudes as in .*, got 4/);
});

it("different calendars, different heights and a track among grids are refused with both files named", async () => {
  const first = grid({ times: [29700] });
  const noleap = grid({ times: [29701], calendar: "noleap" });
  expect((await faultOf(() => index([first, noleap]))).message).toMatch(
    /the standard calendar of .*got the noleap calendar/,
  );
  const heightAttributes = { standard_name: "sea_surface_height_above_sea_level" };
  const anomaly = grid({ times: [29701], heightAttributes });
  expect((await faultOf(() => index([first, anomaly]))).message).toMatch(
    /above geoid as adt in .*got adt above mean-sea-level/,
  );
});

describe.each<[string, GridRecipe]>([
  ["time, latitude, longitude", {}],
  ["longitude, latitude, time", { order: ["longitude", "latitude", "time"] }],
  ["latitude, depth, longitude, time", { order: ["latitude", "depth", "longitude", "time"] }],
  ["southward latitude", { latitudes: [22, 21, 20] }],
  ["westward longitude", { longitudes: [213, 212, 211, 210] }],
  [
    "both reversed, time in the middle",
    { latitudes: [22, 21, 20], longitudes: [213, 212, 211, 210], order: ["longitude", "time", "latitude"] },
  ],
  ["longitudes stored over the turn", { longitudes: [358, 359, 0, 1] }],
])("stored as %s", (_, recipe) => {
  it("planes come out northward and eastward, whole and in a window", async () => {
    const joined = await index([grid({ ...recipe, times: [29700, 29701, 29702] })]);
    expectTruth(joined, await planes(joined), joined.latitude.values, joined.longitude.values, 0.001);
    const window: GridWindow = {
      time: [1, 3],
      latitude: [1, 3],
      longitude: [
        [2, 4],
        [0, 1],
      ],
    };
    const found = await planes(joined, window);
    expect([...found.keys()]).toEqual([1, 2]);
    const { values } = joined.longitude;
    expectTruth(joined, found, joined.latitude.values.slice(1, 3), [values[2], values[3], values[0]], 0.001);
  });
});

it("the same box holds the same heights from files stored northward and southward, from 0 and from -180", async () => {
  const globe = Array.from({ length: 36 }, (_, i) => i * 10);
  const region = { west: 350, east: 10, south: 20, north: 21 };
  const results: number[][] = [];
  for (const latitudes of [
    [20, 21, 22],
    [22, 21, 20],
  ]) {
    for (const longitudes of [globe, globe.map((longitude) => longitude - 180)]) {
      const joined = await index([grid({ latitudes, longitudes, times: [29700] })]);
      const { latitude, longitude, axes } = selectRegion(joined, region, "region");
      expect([...axes.longitude.values]).toEqual([350, 360, 370]);
      const found = await planes(joined, { time: [0, 1], latitude, longitude });
      results.push(found.get(0) ?? []);
    }
  }
  expect(results[0]).toHaveLength(6);
  for (const result of results) expect(result).toEqual(results[0]);
});

it("dates that no file has are not handed over, and missing cells are NaN and counted", async () => {
  const value = (day: number, latitude: number, longitude: number) =>
    latitude === 21 ? Number.NaN : knownHeight(day, latitude, longitude);
  const joined = await index([grid({ times: [29700, 29701], value }), grid({ times: [29704], value })]);
  const seen: number[] = [];
  const counts = await readHeights(joined, all(joined), (timeIndex, plane) => {
    seen.push(timeIndex);
    expect([...plane].map(Number.isNaN)).toEqual([
      false,
      false,
      false,
      false,
      true,
      true,
      true,
      true,
      false,
      false,
      false,
      false,
    ]);
  });
  expect(seen).toEqual([0, 1, 4]);
  expect(counts).toEqual({ fill: 12, validRange: 0, notFinite: 0 });
});

it("a compressed file reads as Python wrote it, in time order", async () => {
  const joined = await index([fixture("chunked.nc")]);
  const found = await planes(joined);
  const expected = expectedFiles["chunked.nc"].map((raw) => (raw === -32767 ? Number.NaN : raw * 1e-4));
  expect([...found.values()].flat()).toEqual(expected);
});

it("a file that was cut or changed after indexing is refused by name", async () => {
  const path = grid({ times: [29700] });
  const joined = await index([path]);
  utimesSync(path, new Date(), new Date(Date.now() + 5000));
  expect((await faultOf(() => planes(joined))).message).toMatch(
    /expected the file as it was indexed, got one changed since/,
  );
  truncateSync(path, 900);
  expect((await faultOf(() => planes(joined))).where).toContain(path);
});

it("a damaged chunk names the file, the variable and the dates", async () => {
  const { readFileSync } = await import("node:fs");
  const bytes = readFileSync(fixture("chunked.nc"));
  const starts = [...bytes.keys()].filter((i) => bytes[i] === 0x78 && [0x5e, 0x9c].includes(bytes[i + 1]));
  bytes.fill(0x55, starts[5] + 20, starts[5] + 120);
  const path = join(folder, "damaged.nc");
  writeFileSync(path, bytes);
  const joined = await index([path]);
  expect((await faultOf(() => planes(joined))).message).toMatch(
    /damaged\.nc: adt, 2031-\d\d-\d\d to 2031-\d\d-\d\d: expected readable/,
  );
});

it("a cancel stops the reading between two planes, and so does an error from the poll", async () => {
  const joined = await index([grid({ times: [29700, 29701, 29702] })]);
  const controller = new AbortController();
  let seen = 0;
  const read = readHeights(
    joined,
    all(joined),
    () => {
      seen++;
      controller.abort();
    },
    { signal: controller.signal },
  );
  expect((await faultOf(() => read)).tag).toBe("cancelled");
  expect(seen).toBe(1);
  const stop = new Fault({ tag: "cancelled", where: "poll", expected: "", got: "", advice: "" });
  const poll = () => {
    throw stop;
  };
  expect(await faultOf(() => readHeights(joined, all(joined), () => {}, { poll }))).toBe(stop);
});

it("an index is plain data: a structured clone of it reads the same", async () => {
  const joined = await index([grid()]);
  expect(await planes(structuredClone(joined))).toEqual(await planes(joined));
});

it("300 compressed maps of 87 × 101 cells are read in under half a second", async () => {
  const path = join(folder, "record.nc");
  await writeRecord(path);
  const joined = await index([path]);
  const times: number[] = [];
  for (let i = 0; i < 3; i++) {
    const start = cpuMilliseconds();
    let seen = 0;
    await readHeights(joined, all(joined), () => seen++);
    times.push(cpuMilliseconds() - start);
    expect(seen).toBe(300);
  }
  // The best of three, so that a busy machine does not decide.
  expect(Math.min(...times)).toBeLessThan(500);
});
