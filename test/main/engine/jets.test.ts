import { readFileSync } from "node:fs";
import { join } from "node:path";
import { fileURLToPath } from "node:url";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import type { EddyTestResult, JetsResult } from "../../../core/model/jets-result";
import { createEngine } from "../../../main/engine/engine";
import { sampleStudy, smallCut } from "../../sample";
import { pythonJson } from "../../setup/python";
import { temporaryFolder } from "../../temporary-folder";

const engine = createEngine({ workers: 2 });
afterAll(() => engine.close());

/** Everything slower than 90 days, the mean flow included: where standing jets can be seen. */
const standing = {
  band: { shortestDays: 90, longestDays: null },
  background: { mean: false, trend: false },
  eddyTest: { oceans: 500 },
};

/** Extremes of the generator's own time mean of u over the model's rows, at least 1 cm/s prominent, by scipy. */
function trueJets(): { latitude: number; sign: 1 | -1 }[] {
  const path = fileURLToPath(new URL("../../truth/halcyon-truth.nc", import.meta.url));
  return pythonJson(`
import json, netCDF4, numpy
from scipy.signal import find_peaks
d = netCDF4.Dataset("${path}")
u = numpy.asarray(d["mean_u"][:], dtype=float); lat = numpy.asarray(d["row"][:], dtype=float)
out = []
for sign in (1, -1):
    for i in find_peaks(sign * u, prominence=0.01)[0]:
        if sign * u[i] > 0: out.append({"latitude": float(lat[i]), "sign": sign})
print(json.dumps(out))`);
}

describe("the sample's standing jets, 500 oceans", () => {
  const open = sampleStudy(standing);
  let jets: JetsResult;
  let eddies: EddyTestResult;
  let seconds = 0;
  beforeAll(async () => {
    jets = await engine.jets({ open, grid: "A" });
    const begun = performance.now();
    eddies = await engine.eddyTest({ open, grid: "A" });
    seconds = (performance.now() - begun) / 1000;
  });

  test("the jets held are those of the truth run that made the heights: none missed inside the region, none invented", () => {
    const truth = trueJets().filter(({ latitude }) => latitude > 20.6 && latitude < 41);
    const held = jets.jets.filter(({ id }) => eddies.verdicts.find(({ jet }) => jet === id)?.verdict === "held");
    const near = (a: { latitude: number; sign: number }, latitude: number, sign: number) =>
      a.sign === sign && Math.abs(a.latitude - latitude) < 0.6;
    const missed = truth.filter((each) => !held.some((jet) => near(each, jet.meanLatitude, jet.sign)));
    const invented = held.filter((jet) => !truth.some((each) => near(each, jet.meanLatitude, jet.sign)));
    expect(truth.length).toBeGreaterThanOrEqual(8);
    expect({ missed, invented: invented.map(({ meanLatitude }) => meanLatitude) }).toEqual({
      missed: [],
      invented: [],
    });
  });

  test("the same seed gives the same answer on one worker, another seed another", async () => {
    const short = sampleStudy({ ...standing, eddyTest: { oceans: 12 } });
    const alone = createEngine({ workers: 1 });
    const [one, two] = [
      await alone.eddyTest({ open: short, grid: "A" }),
      await engine.eddyTest({ open: short, grid: "A" }),
    ];
    await alone.close();
    expect(one).toEqual(two);
    const other = sampleStudy({ ...standing, eddyTest: { oceans: 12, seed: 7 } });
    expect((await engine.eddyTest({ open: other, grid: "A" })).verdicts).not.toEqual(one.verdicts);
  });

  test("the test carries the key of the jets it tested, and another band has another", async () => {
    expect(eddies.key).toBe(jets.key);
    const narrower = await engine.jets({
      open: sampleStudy({ ...standing, band: { shortestDays: 120, longestDays: null } }),
      grid: "A",
    });
    expect(narrower.key).not.toBe(jets.key);
  });

  test("500 oceans take under a minute", () => {
    expect(seconds).toBeLessThan(60);
  });

  test("estimates are shown with how they were found, and can be set by hand", async () => {
    expect(eddies.population.notes.amplitude).toMatch(/eddies on/);
    const set = sampleStudy({ ...standing, eddyTest: { oceans: 5, population: { lifetimeDays: 60 } } });
    const { population } = await engine.eddyTest({ open: set, grid: "A" });
    expect(population.lifetimeDays).toBe(60);
    expect(population.notes.lifetime).toBe("set by hand");
  });

  test("steady jets keep their sign nearly always, and stand above red noise somewhere", () => {
    const strongest = jets.persistence.share.reduce((most, share) => Math.max(most, share), 0);
    expect(strongest).toBe(1);
    expect(jets.jets.every(({ zonalExtent }) => zonalExtent > 0.5)).toBe(true);
  });
});

describe("a run writes its jets", () => {
  test("jets.csv, summary and methods tell the same numbers", async () => {
    const folder = join(temporaryFolder(), "jets");
    const open = sampleStudy({ ...standing, eddyTest: { oceans: 40 }, outputs: { fields: "none" } });
    const { files } = await engine.run({ open, folder, overwrite: false });
    expect(files).toContain("jets.csv");
    const [header, ...rows] = readFileSync(join(folder, "jets.csv"), "utf8").trim().split("\n");
    const summary = JSON.parse(readFileSync(join(folder, "summary.json"), "utf8"));
    expect(rows.length).toBe(summary.jets.found);
    expect(header).toContain("latitude [degrees_north]");
    expect(rows.filter((row) => row.endsWith(",held")).length).toBe(summary.jets.eddyTest.held);
    expect(readFileSync(join(folder, "methods.md"), "utf8")).toContain(
      "40 random oceans of passing Gaussian eddies (seed 1)",
    );
  });

  test("a record too short for jets still runs, and the summary says why there are none", async () => {
    const folder = join(temporaryFolder(), "short");
    const open = sampleStudy({
      ...smallCut,
      period: { from: "2031-03-03", to: "2031-03-14" },
      band: { filter: "none" },
      background: { mean: true, trend: false, annual: false, semiannual: false },
      outputs: { fields: "none" },
    });
    await engine.run({ open, folder, overwrite: false });
    const { jets } = JSON.parse(readFileSync(join(folder, "summary.json"), "utf8"));
    expect(jets.notMade).toMatch(/at least 8 dates/);
  });
});

describe("jets are refused with one clear line", () => {
  const line = (work: Promise<unknown>) =>
    work.then(
      () => "no fault",
      (error: Error) => error.message,
    );
  test.each([
    [
      "three dates",
      {
        period: { from: "2031-03-03", to: "2031-03-10" },
        band: { filter: "none" },
        background: { annual: false, semiannual: false, trend: false },
      },
      /at least 8 dates/,
    ],
    ["two rows", { region: { west: -150, east: -130, south: 20, north: 20.5 } }, /at least 3 latitudes/],
    ["land alone", { region: { west: -142.2, east: -141.4, south: 24.2, north: 24.9 } }, /land or missing values/],
  ])("%s", async (_, changes, pattern) => {
    expect(await line(engine.jets({ open: sampleStudy(changes), grid: "A" }))).toMatch(pattern);
  });

  test("no jet to test", async () => {
    const open = sampleStudy({ ...smallCut, jets: { prominence: 5 } });
    expect(await line(engine.eddyTest({ open, grid: "A" }))).toMatch(/at least one jet to test, got none/);
  });
});
