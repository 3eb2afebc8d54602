import { createHash } from "node:crypto";
import { existsSync, readdirSync, readFileSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { afterAll, describe, expect, test } from "vitest";
import type { Fault } from "../../../core/model/errors";
import { quantities } from "../../../core/ocean/quantities/index";
import { createEngine } from "../../../main/engine/engine";
import { expectAllClose } from "../../expect-close";
import { sampleStudy, smallCut } from "../../sample";
import { temporaryFolder } from "../../temporary-folder";

const temporary = temporaryFolder();
const engine = createEngine({ workers: 2 });
afterAll(() => engine.close());
const open = sampleStudy(smallCut);

function hashOf(folder: string): Record<string, string> {
  const files = readdirSync(folder, { recursive: true, withFileTypes: true }).filter((entry) => entry.isFile());
  return Object.fromEntries(
    files.map((entry) => [
      entry.name,
      createHash("sha256")
        .update(readFileSync(join(entry.parentPath, entry.name)))
        .digest("hex"),
    ]),
  );
}

describe("the engine", () => {
  test("loads a region and period on a regular axis where missing dates are marked", async () => {
    const record = await engine.load({ open: sampleStudy(), grid: "A" });
    expect(record.time.values.length).toBe(300);
    expect(record.time.step).toBe(3);
    expect(record.hasData.filter((flag) => flag === 0).length).toBeGreaterThan(2);
    expect(Array.from(record.coverage, (share) => (share > 0 ? 1 : 0))).toEqual(Array.from(record.hasData));
    expect(record.cautions.map(({ id }) => id)).toContain("gaps");
  });

  test("reads the descending grid in centimetres on 0 to 360 degrees like the other: metres, south to north, asked longitudes", async () => {
    const [a, b] = [
      await engine.load({ open: sampleStudy(), grid: "A" }),
      await engine.load({ open: sampleStudy(), grid: "B" }),
    ];
    expect(b.latitude.values[0]).toBeLessThan(b.latitude.values[1]);
    expect(b.longitude.values[0]).toBeGreaterThanOrEqual(-150);
    const request = { open: sampleStudy(), choice: { quantity: "height", inBand: false }, dateIndex: 0, columns: 10 };
    const rms = async (grid: string) => {
      const { map } = await engine.latitudes({ ...request, grid });
      const valid = map.values.filter((value) => !Number.isNaN(value));
      return Math.sqrt(valid.reduce((sum, value) => sum + value * value, 0) / valid.length);
    };
    expect(a.time.values[0]).toBe(b.time.values[0]);
    const [rmsA, rmsB] = [await rms("A"), await rms("B")];
    expect(rmsB / rmsA).toBeGreaterThan(0.7);
    expect(rmsB / rmsA).toBeLessThan(1.3);
  });

  test.each(quantities.map(({ id }) => id))(
    "draws %s as it stands and in the band, with blanks where there are no data",
    async (quantity) => {
      const record = await engine.load({ open, grid: "A" });
      for (const inBand of [false, true]) {
        const result = await engine.latitudes({
          open,
          grid: "A",
          choice: { quantity, inBand },
          dateIndex: 40,
          columns: 500,
        });
        expect(result.map.values.length).toBe(record.latitude.values.length * record.longitude.values.length);
        expect(result.map.values.some(Number.isFinite)).toBe(true);
        result.columnDates.forEach((date, column) => {
          const values = Array.from(
            record.latitude.values,
            (_, row) => result.latitudeTime.values[row * result.columnDates.length + column],
          );
          expect(values.some(Number.isFinite), `${date}`).toBe(record.hasData[date] === 1);
        });
        expect(result.limits[0]).toBeLessThan(result.limits[1]);
      }
    },
  );

  test("the column of the picture on a date is the zonal mean of the map on that date", async () => {
    for (const quantity of ["u", "vorticity", "speed"]) {
      const result = await engine.latitudes({
        open,
        grid: "A",
        choice: { quantity, inBand: true },
        dateIndex: 33,
        columns: 500,
      });
      const rows = result.latitudeTime.rows;
      const column = Float64Array.from(
        { length: rows },
        (_, row) => result.latitudeTime.values[row * result.columnDates.length + 33],
      );
      expectAllClose(
        column,
        result.onDate,
        { relative: 1e-6, because: "the promise of the linear shortcut" },
        quantity,
      );
    }
  });

  test("thins the picture's dates to the columns asked for", async () => {
    const result = await engine.latitudes({
      open,
      grid: "A",
      choice: { quantity: "u", inBand: true },
      dateIndex: 3,
      columns: 30,
    });
    expect(result.columnDates.length).toBeLessThanOrEqual(30);
    expect(result.latitudeTime.columns).toBe(result.columnDates.length);
  });

  test("a spectrum's integral is the variance left after the background", async () => {
    const { frequency, density } = await engine.spectrum({ open: sampleStudy(), grid: "A", quantity: "u" });
    const variance = density.reduce((sum, value) => sum + value, 0) * frequency[1];
    const summary = join(temporary, "spectrum");
    await engine.run({ open: sampleStudy({ outputs: { fields: "none" } }), folder: summary, overwrite: false });
    const { headline } = JSON.parse(readFileSync(join(summary, "summary.json"), "utf8"));
    expect(Math.sqrt(variance)).toBeLessThan(headline.uRootMeanSquare.value);
    expect(Math.sqrt(variance)).toBeGreaterThan(headline.uBandRootMeanSquare.value * 0.8);
  });

  test("one, two and four workers write the same bytes", async () => {
    const hashes = [];
    for (const workers of [1, 2, 4]) {
      const own = createEngine({ workers });
      const folder = join(temporary, `workers-${workers}`);
      await own.run({ open: sampleStudy({ ...smallCut, outputs: { fields: "all" } }), folder, overwrite: false });
      await own.close();
      hashes.push(hashOf(folder));
    }
    expect(hashes[1]).toEqual(hashes[0]);
    expect(hashes[2]).toEqual(hashes[0]);
  });

  test("a cancel answers within 200 ms, leaves no folder, and the same work can be done afterwards", async () => {
    const own = createEngine({ workers: 2 });
    const whole = sampleStudy({ outputs: { fields: "all" } });
    for (const wait of [30, 400, 1500]) {
      const stop = new AbortController();
      const folder = join(temporary, `cancelled-${wait}`);
      const running = own.run({ open: whole, folder, overwrite: false }, { signal: stop.signal }).then(
        () => "done",
        (error: Fault) => error.tag,
      );
      await new Promise((done) => setTimeout(done, wait));
      const asked = performance.now();
      stop.abort();
      expect(await running).toBe("cancelled");
      expect(performance.now() - asked).toBeLessThan(1000);
      expect(existsSync(folder)).toBe(false);
    }
    const record = await own.load({ open: whole, grid: "A" });
    expect(record.time.values.length).toBe(300);
    await own.close();
  });

  test("a study saved elsewhere still finds its files", async () => {
    const path = join(temporary, "kept.study.json");
    await engine.save({ open, path });
    const again = await engine.open({ paths: [path] });
    const record = await engine.load({ open: again, grid: "A" });
    expect(record.latitude.values.length).toBeGreaterThan(20);
  });

  test("data files alone make a study whose band and background the record can carry", async () => {
    const folder = `${sampleStudy().folder}/grid`;
    const made = await engine.open({ paths: [`${folder}/halcyon-a-2033.nc`] });
    expect(made.study.band.filter).toBe("none");
    const result = await engine.latitudes({
      open: made,
      grid: "A",
      choice: { quantity: "u", inBand: false },
      dateIndex: 0,
      columns: 100,
    });
    expect(result.map.values.some(Number.isFinite)).toBe(true);
    const whole = await engine.open({
      paths: ["a-2031", "a-2032", "a-2033"].map((name) => `${folder}/halcyon-${name}.nc`),
    });
    expect(whole.study.grids.length).toBe(1);
    expect(whole.study.band.filter).toBe("lanczos");
  });
});

describe("the engine refuses with one clear line", () => {
  const line = async (work: Promise<unknown>) =>
    work.then(
      () => "no fault",
      (error: Error) => error.message,
    );
  const load = (changes: object) => line(engine.load({ open: sampleStudy(changes), grid: "A" }));
  const view = (changes: object) =>
    line(
      engine.latitudes({
        open: sampleStudy(changes),
        grid: "A",
        choice: { quantity: "u", inBand: true },
        dateIndex: 0,
        columns: 10,
      }),
    );

  test.each([
    [
      "a region outside the data",
      () => load({ region: { west: 10, east: 20, south: 20, north: 40 } }),
      /grid A: region: expected cells within latitude/,
    ],
    ["two rows", () => load({ region: { west: -150, east: -125, south: 20, north: 20.5 } }), /at least 3 latitudes/],
    [
      "a period outside the data",
      () => load({ period: { from: "2001-01-01", to: "2002-01-01" } }),
      /grid A: period: expected dates within/,
    ],
    [
      "land alone",
      () => load({ region: { west: -142.2, east: -141.4, south: 24.2, north: 24.9 } }),
      /land or missing values/,
    ],
    [
      "one date with a band",
      () => view({ period: { from: "2031-03-03", to: "2031-03-04" } }),
      /band: expected a record of many dates/,
    ],
    [
      "a band under twice the sampling",
      () => view({ band: { shortestDays: 5, longestDays: 90 } }),
      /at least twice the sampling of 3 days, got 5 days; choose 6 days or more/,
    ],
    [
      "a band longer than the record",
      () => view({ band: { longestDays: 2000 } }),
      /at most the record's length of 900 days/,
    ],
    [
      "band edges out of order",
      () => view({ band: { shortestDays: 200, longestDays: 100 } }),
      /more than the shortest period/,
    ],
    [
      "three dates with an annual cycle",
      () => view({ period: { from: "2031-03-03", to: "2031-03-10" }, band: { shortestDays: 6, longestDays: 9 } }),
      /dates enough to tell 6 terms apart/,
    ],
    ["an unknown grid", () => line(engine.load({ open: sampleStudy(), grid: "Z" })), /one of A, B/],
    [
      "a file that is not there",
      () => load({ grids: [{ id: "A", files: ["grid/none-*.nc"] }] }),
      /none-\*\.nc: expected a file in/,
    ],
    [
      "tracks given as a grid",
      () => load({ grids: [{ id: "A", files: ["tracks/plover.nc"] }] }),
      /expected gridded maps/,
    ],
    [
      "an unknown figure",
      () =>
        line(
          engine.run({
            open: sampleStudy({ outputs: { figures: ["latitude"] } }),
            folder: join(temporary, "f"),
            overwrite: false,
          }),
        ),
      /did you mean "latitudes"/,
    ],
  ])("%s", async (_, act, pattern) => {
    expect(await act()).toMatch(pattern);
  });

  test("a record beyond the memory budget is refused before it is read", async () => {
    process.env.STRAKE_MEMORY_MB = "1";
    try {
      expect(await load({ period: { from: "2031-03-03", to: "2033-08-15" } })).toMatch(/at most 1 MB of memory/);
    } finally {
      delete process.env.STRAKE_MEMORY_MB;
    }
  });

  test("a study with a key misspelt names the nearest one", async () => {
    const path = join(temporary, "wrong.study.json");
    writeFileSync(path, JSON.stringify({ strake: 1, grids: [{ id: "A", files: ["a.nc"] }], band: { shortestDay: 3 } }));
    expect(await line(engine.open({ paths: [path] }))).toMatch(/band\.shortestDay.*did you mean "shortestDays"/);
  });
});
