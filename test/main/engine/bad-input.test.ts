import { join } from "node:path";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { quantities } from "../../../core/ocean/quantities/index";
import { createEngine } from "../../../main/engine/engine";
import { expectAllClose, expectClose } from "../../expect-close";
import { line, type MadeGrid, studyOf, writeMadeGrid } from "../../properties/made-grid";
import { readBack, readRun } from "../../properties/read-back";
import { temporaryFolder } from "../../temporary-folder";

const temporary = temporaryFolder();
const engine = createEngine({ workers: 2 });
afterAll(() => engine.close());

const good: MadeGrid = {
  latitudes: line(30, 0.5, 9),
  longitudes: line(-150, 0.5, 11),
  days: line(20000, 3, 60),
  height: (day, y, x) => 0.5 + 0.1 * Math.sin(day / 8 + y + x / 2),
};
let files = 0;
const made = (changes: Partial<MadeGrid>) =>
  writeMadeGrid(join(temporary, `made-${++files}.nc`), { ...good, ...changes });

/** The message of the fault, which must be one line that names place, expectation, finding and advice. */
async function refusal(work: Promise<unknown>): Promise<string> {
  const fault = await work.then(
    () => expect.fail("it was not refused"),
    (error: Error) => error,
  );
  expect(fault.name).toBe("Fault");
  expect(fault.message).toMatch(/^\S[^\n]*: expected [^\n]+, got [^\n]+; [^\n]+$/);
  expect(fault.message.length).toBeLessThan(400);
  expect(fault).not.toMatchObject({ tag: "internal" });
  return fault.message;
}

async function loadMade(changes: Partial<MadeGrid>, study: object = {}) {
  return engine.load({ open: studyOf([await made(changes)], study), grid: "A" });
}

async function viewMade(changes: Partial<MadeGrid>, study: object = {}, inBand = false) {
  const open = studyOf([await made(changes)], study);
  return engine.latitudes({ open, grid: "A", choice: { quantity: "u", inBand }, dateIndex: 0, columns: 100 });
}

describe("coordinates that are no axis are refused with the file, the variable and the index", () => {
  test.each([
    [
      "latitudes out of order",
      { latitudes: [30, 31, 30.5, 32] },
      /latitude: .*only rises, got 31 then 30\.5 at indices 1 and 2/,
    ],
    [
      "longitudes out of order",
      { longitudes: [-150, -149, -149.5, -148] },
      /longitude: .*only rises, got -149 then -149\.5/,
    ],
    ["a latitude twice", { latitudes: [30, 31, 31, 32] }, /latitude: .*the same value 31 at indices 1 and 2/],
    [
      "a longitude twice",
      { longitudes: [-150, -149, -149, -148] },
      /longitude: .*the same value -149 at indices 1 and 2/,
    ],
    ["a latitude that is NaN", { latitudes: [30, Number.NaN, 31, 32] }, /latitude: .*got NaN at index 1/],
    ["a longitude that is NaN", { longitudes: [-150, -149, Number.NaN, -148] }, /longitude: .*got NaN at index 2/],
    ["a latitude beyond the pole", { latitudes: [88, 89, 90, 91] }, /latitudes from -90 to 90, got 91 at index 3/],
    ["a time that is NaN", { days: [20000, Number.NaN, 20006] }, /a date for every map, got NaN at index 1/],
  ] as const)("%s", async (_, changes, pattern) => {
    const message = await refusal(loadMade(changes));
    expect(message).toMatch(pattern);
    expect(message).toMatch(/made-\d+\.nc/);
  });
});

describe("too little to take a slope from is refused, not blank", () => {
  test.each([
    ["one latitude", { latitudes: [30] }, {}, /at least 3 latitudes to take a slope, got 1/],
    ["two longitudes", { longitudes: [-150, -149] }, {}, /at least 3 longitudes to take a slope, got 2/],
    [
      "a region one latitude high",
      {},
      { region: { west: -150, east: -146, south: 31, north: 31.2 } },
      /at least 3 latitudes to take a slope, got 1/,
    ],
  ] as const)("%s", async (_, changes, study, pattern) => {
    expect(await refusal(loadMade(changes, study))).toMatch(pattern);
    expect(await refusal(viewMade(changes, study))).toMatch(pattern);
  });

  test("a region of land alone", async () => {
    const isLand = (x: number) => x > -148.1;
    const height: MadeGrid["height"] = (day, y, x) => (isLand(x) ? Number.NaN : good.height(day, y, x));
    const region = { west: -148, east: -145, south: 30, north: 34 };
    expect(await refusal(loadMade({ height }, { region }))).toMatch(
      /land or missing values in every cell on every date/,
    );
  });

  test("a file of land alone", async () => {
    expect(await refusal(loadMade({ height: () => Number.NaN }))).toMatch(/land or missing values in every cell/);
  });
});

describe("a sea that is flat and still", () => {
  const flat = 0.7;
  const band = { filter: "lanczos", shortestDays: 18, longestDays: 60 };
  const background = { mean: true, trend: true, annual: false, semiannual: false };
  let path = "";
  beforeAll(async () => {
    path = await made({ height: () => flat });
  });

  test("has no velocity and vorticity beyond rounding, as it stands and in the band", async () => {
    const open = studyOf([path], { band, background });
    const folder = join(temporary, "flat");
    await engine.run({ open, folder, overwrite: false });
    const names = ["height", "u", "v", "vorticity", "height_band", "u_band", "v_band", "vorticity_band"];
    const fields = readBack(join(folder, "fields.nc"), names);
    for (const name of names) expect(fields[name].some(Number.isNaN), name).toBe(false);
    const largest = (name: string) => fields[name].reduce((most, value) => Math.max(most, Math.abs(value)), 0);
    // 0.7 m in float64 carries 1e-16 m; over 48 km at 30° that is some 1e-13 m/s, twice differenced 1e-17 per second.
    expect(largest("height_band")).toBeLessThan(1e-14);
    for (const name of ["u", "v", "u_band", "v_band"]) expect(largest(name), name).toBeLessThan(1e-12);
    for (const name of ["vorticity", "vorticity_band"]) expect(largest(name), name).toBeLessThan(1e-16);
    const { summary } = readRun(folder);
    for (const [name, { value }] of Object.entries(summary.headline as Record<string, { value: number | null }>)) {
      expect(value === null || Number.isFinite(value), name).toBe(true);
    }
    expect(summary.headline.uRootMeanSquare.value).toBeLessThan(1e-12);
  });

  test.each(quantities.map(({ id }) => id))(
    "gives %s finite values or blanks, and limits in order",
    async (quantity) => {
      for (const inBand of [false, true]) {
        const open = studyOf([path], { band, background });
        const request = { open, grid: "A", choice: { quantity, inBand }, dateIndex: 30, columns: 100 };
        const { map, limits, pictureLimits, profile } = await engine.latitudes(request);
        expect(map.values.every(Number.isFinite)).toBe(true);
        for (const [low, high] of [limits, pictureLimits]) {
          expect(Number.isFinite(low) && Number.isFinite(high) && low < high, `${low} to ${high}`).toBe(true);
        }
        expect(profile.mean.some((value) => Math.abs(value) === Number.POSITIVE_INFINITY)).toBe(false);
        expect(profile.half95.every((value) => Number.isNaN(value) || Number.isFinite(value))).toBe(true);
      }
    },
  );

  test("gives a spectrum without power and a profile of zero", async () => {
    const open = studyOf([path], { band, background });
    const { density } = await engine.spectrum({ open, grid: "A", quantity: "u" });
    expect(density.every((value) => value >= 0 && value < 1e-20)).toBe(true);
    const request = { open, grid: "A", choice: { quantity: "u", inBand: false }, dateIndex: 0, columns: 100 };
    const { profile, limits } = await engine.latitudes(request);
    for (const mean of profile.mean) expect(Math.abs(mean)).toBeLessThan(1e-12);
    expect(limits).toEqual([-1, 1]);
  });

  test("is not painted with what rounding leaves: the limits are those of an empty field", async () => {
    for (const quantity of ["height", "u", "v", "vorticity", "speed", "kinetic-energy", "okubo-weiss"]) {
      const open = studyOf([path], { band, background });
      const request = { open, grid: "A", choice: { quantity, inBand: true }, dateIndex: 30, columns: 100 };
      const { limits, pictureLimits } = await engine.latitudes(request);
      for (const [, high] of [limits, pictureLimits]) expect(high, quantity).toBe(1);
    }
  });
});

describe("dates", () => {
  test("three dates with an annual cycle asked for are refused, naming the terms", async () => {
    const study = {
      background: { mean: true, trend: true, annual: true, semiannual: false },
      band: { filter: "running-mean", shortestDays: 6, longestDays: 9 },
    };
    const message = await refusal(viewMade({ days: line(20000, 3, 3) }, study, true));
    expect(message).toMatch(
      /background: expected dates enough to tell 4 terms apart .*annual.*, got 3 dates with data/,
    );
  });

  test("one date has a map, and a band asked of it is refused", async () => {
    const { map } = await viewMade({ days: [20000] });
    expect(map.values.every(Number.isFinite)).toBe(true);
    const study = { band: { filter: "lanczos", shortestDays: 30, longestDays: 60 } };
    expect(await refusal(viewMade({ days: [20000] }, study, true))).toMatch(/a record of many dates to filter/);
  });

  test("a record in pieces too short for the filter has no value in the band, and says so by marks", async () => {
    const days = line(20000, 3, 120).filter((_, t) => t % 12 < 6);
    const study = { band: { filter: "lanczos", shortestDays: 30, longestDays: 90, bridgeDays: 0 } };
    const { map, filterEnd, limits } = await viewMade({ days }, study, true);
    expect(map.values.some(Number.isFinite)).toBe(false);
    expect(filterEnd.every((mark) => mark === 1)).toBe(true);
    expect(limits).toEqual([-1, 1]);
  });

  test("a date twice in one file: the first is kept and the second is noted", async () => {
    let date = 0;
    const cells = good.latitudes.length * good.longitudes.length;
    // The third map has the second one's date and another height.
    const height = () => [0, 1, 5, 3][Math.floor(date++ / cells)];
    const path = await made({ days: [20000, 20003, 20003, 20006], height });
    const folder = join(temporary, "twice");
    await engine.run({ open: studyOf([path]), folder, overwrite: false });
    const { height: values } = readBack(join(folder, "fields.nc"), ["height"]);
    expect([0, 1, 2].map((t) => values[t * cells])).toEqual([0, 1, 3]);
    expect(values.length).toBe(3 * cells);
    expect(readRun(folder).summary.grid.notes.join(" ")).toMatch(
      /2024-10-07 is in .* and again in .*: the first is kept/,
    );
  });

  test("a date in two files: the first file's is kept and the other is noted", async () => {
    const first = await made({ days: [20000, 20003], height: () => 1 });
    const second = await made({ days: [20003, 20006], height: () => 2 });
    const folder = join(temporary, "overlap");
    await engine.run({ open: studyOf([second, first]), folder, overwrite: false });
    const { height } = readBack(join(folder, "fields.nc"), ["height"]);
    expect([0, 1, 2].map((t) => height[t * 99])).toEqual([1, 1, 2]);
    expect(readRun(folder).summary.grid.notes.join(" ")).toMatch(/again in/);
  });

  test("dates at uneven steps have maps; a band asked of them is refused", async () => {
    const days = [20000, 20003, 20007, 20008, 20020, 20031];
    const { map } = await viewMade({ days });
    expect(map.values.every(Number.isFinite)).toBe(true);
    const study = { band: { filter: "lanczos", shortestDays: 9, longestDays: 20 } };
    expect(await refusal(viewMade({ days }, study, true))).toMatch(/dates an even step apart, got an irregular record/);
  });
});

describe("files of different grids are refused with both names", () => {
  test.each([
    ["more rows", { latitudes: line(30, 0.5, 10) }, /expected 9 latitudes as in \S*made-\d+\.nc, got 10/],
    [
      "rows elsewhere",
      { latitudes: line(30.25, 0.5, 9) },
      /expected latitude 30 at index 0 as in \S*made-\d+\.nc, got 30\.25/,
    ],
    ["columns a thousandth of a degree off", { longitudes: line(-149.999, 0.5, 11) }, /longitude -150 at index 0/],
    ["rows the other way", { latitudes: line(30, 0.5, 9).toReversed() }, null],
    ["jitter of 1e-7 degrees", { latitudes: line(30 + 1e-7, 0.5, 9) }, null],
    ["longitudes a turn on", { longitudes: line(210, 0.5, 11) }, null],
  ] as const)("%s", async (_, changes, pattern) => {
    const first = await made({ days: [20000, 20003] });
    const second = await made({ days: [20006, 20009], ...changes });
    const open = studyOf([first, second]);
    if (pattern) {
      const message = await refusal(engine.load({ open, grid: "A" }));
      expect(message).toMatch(pattern);
      return;
    }
    const request = { open, grid: "A", choice: { quantity: "height", inBand: false }, columns: 10 };
    const whole = await engine.load({ open, grid: "A" });
    expect(Array.from(whole.hasData)).toEqual([1, 1, 1, 1]);
    const { map } = await engine.latitudes({ ...request, dateIndex: 2 });
    const [y0, x0] = [whole.latitude.values[0], whole.longitude.values[0]];
    expectClose(y0, 30, { absolute: 1e-6, because: "jitter" });
    const wanted = good.latitudes.flatMap((y) => good.longitudes.map((x) => good.height(20006, y, x)));
    const turned =
      "longitudes" in changes
        ? good.latitudes.flatMap((y) => line(210, 0.5, 11).map((x) => good.height(20006, y, x)))
        : wanted;
    expectAllClose(map.values, turned, { absolute: 1e-6, because: "float32, and heights that move with the jitter" });
    expect(x0).toBe(-150);
  });
});
